/** One element set as CCSDS 502.0-B OMM keywords in JSON. Numbers may come as text, as some feeds send them. */
export type Omm = Readonly<Record<string, unknown>>;

/** Reads the feed's file: a list of OMM objects, or an object whose `omm` is one. */
export function readOmmList(text: string): Omm[] {
  const value: unknown = JSON.parse(text);
  const list = isRecord(value) ? value.omm : value;
  if (!Array.isArray(list) || !list.every(isRecord))
    throw new Error('the elements file must hold a list of OMM objects');
  return list;
}

function isRecord(value: unknown): value is Omm {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

export function numberOf(omm: Omm, key: string): number {
  const value = Number(omm[key]);
  if (omm[key] === undefined || omm[key] === '' || !Number.isFinite(value))
    throw new Error(`${key} is not a number: ${String(omm[key])}`);
  return value;
}

export function epochMsOf(omm: Omm): number {
  const text = String(omm.EPOCH);
  const ms = Date.parse(/Z$/.test(text) ? text : `${text}Z`);
  if (Number.isNaN(ms)) throw new Error(`EPOCH is not a time: ${text}`);
  return ms;
}
