/** One thing that is not the same in two documents, in a person's words and units. */
export interface Difference {
  /** In the later document, as a form names it: 'additions.2.massG'; of what is gone, in the earlier one. */
  path: string;
  what: string;
  /** Null: it was not there. */
  from: string | null;
  /** Null: it is gone. */
  to: string | null;
}

/** A difference with the stable name of what it is about. */
export interface Change extends Difference {
  key: string;
}
