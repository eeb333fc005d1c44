/** Traces differ by dash pattern and label as well as by colour. */
export interface LineStyle {
  readonly colour: string;
  readonly dash?: string;
}

export const lineStyles: readonly LineStyle[] = [
  { colour: 'var(--copper)' },
  { colour: 'var(--patina)', dash: '6 3.5' },
  { colour: 'var(--ochre)', dash: '1.5 3' },
  { colour: 'var(--ink)', dash: '9 3 1.5 3' },
];
