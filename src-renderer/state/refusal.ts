/** Why something that was typed or asked for cannot be taken: a sentence that says what, where and how to mend it. */

/** Told apart from any other text, so that a field never shows what was merely returned. */
export type Refused = string & { readonly refused: true };

export const refusal = (sentence: string): Refused => sentence as Refused;

/** What a change answers: why it was refused, or nothing. */
export type Refusal = Refused | null | false;
