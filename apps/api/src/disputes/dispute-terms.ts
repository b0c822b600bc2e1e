/** The clocks of a dispute. Own policy of the marketplace. */
const DAY_MS = 86_400_000;
/** For the owner's first answer. */
export const STATEMENT_WITHIN_MS = 3 * DAY_MS;
/** For the decision, and again for that of an appeal. */
export const DECIDE_WITHIN_MS = 7 * DAY_MS;
/** After the first decision. */
export const APPEAL_WITHIN_MS = 14 * DAY_MS;
