/** The form of a recurrence rule's parts, RFC 5545 3.3.10, read strictly: the library that expands them checks little. */
const DAY = '(?:MO|TU|WE|TH|FR|SA|SU)';
const listOf = (item: string): RegExp => new RegExp(`^${item}(?:,${item})*$`);
const COUNT = /^[1-9]\d{0,4}$/;

const PARTS: Readonly<Record<string, { readonly form: RegExp; readonly words: string }>> = {
  FREQ: {
    form: /^(?:YEARLY|MONTHLY|WEEKLY|DAILY)$/,
    words: 'DAILY, WEEKLY, MONTHLY or YEARLY; anything denser than a day is written as several rules',
  },
  INTERVAL: { form: COUNT, words: 'a whole number from 1 to 99999' },
  COUNT: { form: COUNT, words: 'a whole number from 1 to 99999' },
  UNTIL: { form: /^\d{8}(?:T\d{6}Z?)?$/, words: 'a date such as 20261231 or a time such as 20261231T235959Z' },
  WKST: { form: new RegExp(`^${DAY}$`), words: 'a weekday such as MO' },
  BYDAY: { form: listOf(`(?:[+-]?[1-9]\\d?)?${DAY}`), words: 'weekdays such as MO,TU or -1FR' },
  BYMONTH: { form: listOf('(?:[1-9]|1[0-2])'), words: 'months from 1 to 12' },
  BYMONTHDAY: { form: listOf('[+-]?(?:[1-9]|[12]\\d|3[01])'), words: 'days from 1 to 31, or -1 to -31 from the end' },
  BYYEARDAY: { form: listOf('[+-]?[1-9]\\d{0,2}'), words: 'days of the year such as 1,100 or -1' },
  BYWEEKNO: { form: listOf('[+-]?(?:[1-9]|[1-4]\\d|5[0-3])'), words: 'weeks from 1 to 53' },
  BYSETPOS: { form: listOf('[+-]?[1-9]\\d{0,2}'), words: 'places such as 1 or -1' },
};

/** The parts by name, or a sentence that says what is wrong with them. */
export function recurrenceParts(rrule: string): ReadonlyMap<string, string> | string {
  const parts = new Map<string, string>();
  for (const part of rrule.split(';')) {
    const [name = '', value = ''] = part.split('=', 2);
    const rule = Object.hasOwn(PARTS, name) ? PARTS[name] : undefined;
    if (rule === undefined)
      return `“${part}” is not a part that can be used here${/^BY(HOUR|MINUTE|SECOND)$/.test(name) ? '; the time of day comes from the start' : ''}.`;
    if (parts.has(name)) return `${name} stands twice.`;
    if (!rule.form.test(value)) return `${name} is “${value}”; use ${rule.words}.`;
    parts.set(name, value);
  }
  if (!parts.has('FREQ')) return 'it has no FREQ.';
  if (parts.has('COUNT') && parts.has('UNTIL')) return 'COUNT and UNTIL exclude each other.';
  return parts;
}
