/** How a shift of a contact is told. */

/** `AOS 20.0 s later, LOS 18.2 s later`; milliseconds in, later is positive. */
export function shiftWords({ aosMs, losMs }: { readonly aosMs: number; readonly losMs: number }): string {
  return `AOS ${oneShift(aosMs)}, LOS ${oneShift(losMs)}`;
}

function oneShift(shiftMs: number): string {
  const seconds = Math.abs(shiftMs) / 1000;
  if (seconds < 0.05) return 'unchanged';
  const length = seconds < 120 ? `${seconds.toFixed(1)} s` : `${(seconds / 60).toFixed(1)} min`;
  return `${length} ${shiftMs > 0 ? 'later' : 'earlier'}`;
}
