/** A handler throws this when trying again could not help, such as a mailbox that does not exist. */
export class PermanentFailure extends Error {
  override readonly name = 'PermanentFailure';
}
