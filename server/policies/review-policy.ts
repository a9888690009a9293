export interface ReviewedWork {
  /** Who asked for the review. */
  readonly askedBy: string;
  /** The authors of all revisions since the last approval, the reviewed one included. */
  readonly editedBy: readonly string[];
}

/** Nobody approves or returns their own work, whatever role they hold: neither its authors nor who asked. */
export function mayDecideReview(personId: string, { askedBy, editedBy }: ReviewedWork): boolean {
  return personId !== askedBy && !editedBy.includes(personId);
}
