/** A well-formed input that no physical line or network can have; answered with 422, every wrong field at once. */
export class ImpossibleInput extends Error {
  override readonly name = 'ImpossibleInput';

  constructor(readonly problems: readonly InputProblem[]) {
    super(problems.map((problem) => `${problem.pointer}: ${problem.detail}`).join('; '));
  }
}

export interface InputProblem {
  /** RFC 6901, into the request body. */
  readonly pointer: string;
  readonly code: string;
  readonly detail: string;
}
