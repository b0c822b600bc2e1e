/** Forms are checked by the same schemas as the API, with words for an empty field instead of a parser's. */
import { schemaResolver } from '@mantine/form';
import type { z } from 'zod';

/** A number field that may stand empty while it is typed. */
export type NumberOrEmpty = number | '';

const OF_A_PARSER = /^Invalid (input|option)/;

/** The check of a form by a contract's schema; field errors by dotted path. */
export function formRules(schema: z.ZodType): (values: unknown) => Record<string, string> {
  const check = schemaResolver(schema, { sync: true }) as (values: unknown) => Record<string, unknown>;
  return (values) =>
    Object.fromEntries(
      Object.entries(check(values)).map(([path, message]) => [path, plainMessage(String(message ?? ''))]),
    );
}

function plainMessage(message: string): string {
  if (OF_A_PARSER.test(message)) return message.includes('number') ? 'Give a number.' : 'Choose one.';
  const bound = /^Too (small|big): expected number to be [<>]=?\s*(-?[\d.]+)$/.exec(message);
  if (bound) return bound[1] === 'small' ? `At least ${bound[2]}.` : `At most ${bound[2]}.`;
  return message;
}
