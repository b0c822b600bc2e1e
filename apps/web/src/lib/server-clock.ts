/** The marketplace's clock: a countdown must follow the server, whatever this computer believes. */
let offsetMs = 0;

/** Remembers by how much the server's clock is ahead of this one. */
export function setServerTime(serverTimeUtc: string): void {
  offsetMs = Date.parse(serverTimeUtc) - Date.now();
}

/** UTC milliseconds by the server's clock. */
export const serverNowMs = (): number => Date.now() + offsetMs;
