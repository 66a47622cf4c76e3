/** Words too long for a column: where they may go on in the next line. */

/** The longest word of the trade stays whole; what is longer is a name or a number run together. After a hyphen a line breaks anyway. */
const LONG = /([^\s\-–]{19,})/u;
const PART = /.{1,8}/gu;

/** The text in parts between which a line may break; one part where every word is short enough. */
export const parts = (text: string): readonly string[] =>
  text.split(LONG).flatMap((piece, i) => (i % 2 === 1 ? (piece.match(PART) ?? []) : piece === '' ? [] : [piece]));
