/** What was typed cannot be read; the message says what exactly is wrong, ready to stand beside the field. */
export class UnreadableQuantity extends Error {
  override readonly name = 'UnreadableQuantity';
}

export function refuse(message: string): never {
  throw new UnreadableQuantity(message);
}
