/** Parsed JSON whose shape the test asserts; the published document has been checked by then. */
// eslint-disable-next-line @typescript-eslint/no-explicit-any -- assertions read better than casts before them
export type Json = any;
