/** The part of the run scripts' helpers that tests use. */
export const ROOT: string;
export function freePort(): Promise<number>;
