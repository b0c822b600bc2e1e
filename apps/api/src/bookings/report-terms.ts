/** When a report is due. */
const HOUR_MS = 3_600_000;
/** After LOS the station is reminded, and later the contact is closed by rule. */
export const REMIND_AFTER_MS = 2 * HOUR_MS;
/** After LOS the operator may dispute how it went. */
export const DISPUTE_WITHIN_MS = 14 * 24 * HOUR_MS;
export const CLOSE_AFTER_MS = 24 * HOUR_MS;
