/** A source of element sets that somebody else keeps up to date. */
export type FeedAnswer =
  | { readonly kind: 'unchanged' }
  | { readonly kind: 'changed'; readonly text: string; readonly validator: string | null };

export interface ElementFeedPort {
  /** What the source is called beside the sets that come from it. */
  readonly name: string;
  /**
   * Asks for the list; `validator` is that of the last answer, so that an unchanged list is not sent again.
   * Throws where the source does not answer in time, answers with an error, or with more than anybody would send.
   */
  fetch(validator: string | null): Promise<FeedAnswer>;
}
/** The port, or null where no feed is configured. */
export const ELEMENT_FEED = Symbol('ElementFeedPort');
