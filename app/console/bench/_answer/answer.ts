/** An answer of the service to a calculation, as the contract has it. */
export interface Answer {
  readonly id: string;
  readonly calculation: string;
  readonly engine: string;
  readonly result: unknown;
  readonly methods: readonly MethodUse[];
  readonly warnings: readonly AnswerWarning[];
  readonly usage: { readonly units: number; readonly remaining: number };
}

export interface MethodUse {
  readonly id: string;
  readonly title: string;
  readonly source: string;
  readonly range: string;
  readonly accuracy: string;
  readonly in_range: boolean;
}

export interface AnswerWarning {
  readonly code: string;
  readonly pointer: string;
  readonly detail: string;
}
