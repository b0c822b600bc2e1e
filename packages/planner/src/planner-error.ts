/** A plan that cannot even be looked for, with a sentence for the person. */
export class PlannerError extends Error {
  override readonly name = 'PlannerError';
}
