/** Moves with any change of a computed number; CHANGELOG.md says what moved and why. */
export const engineVersion = '1.1.0';
