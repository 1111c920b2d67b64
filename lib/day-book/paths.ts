/** Where a note is read. Two distributors may use the same number, so a workshop's address says whose it is. */
export const notePath = (note: {
  readonly number: string;
  readonly sellerId: string;
}): `/credit-notes/${string}` => `/credit-notes/${encodeURIComponent(note.number)}?of=${note.sellerId}`;

/** The same note as a file. */
export const notePdfPath = (note: {
  readonly number: string;
  readonly sellerId: string;
}): `/api/v1/credit-notes/${string}` =>
  `/api/v1/credit-notes/${encodeURIComponent(note.number)}/pdf?of=${note.sellerId}`;
