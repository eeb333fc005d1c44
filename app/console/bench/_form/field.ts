/**
 * The form as a tree: what the schema of a calculation's input asks of a person. Nothing here knows a
 * calculation; a new one, or a new kind of line, has its form as soon as it has its schema.
 */
interface Described {
  readonly title: string;
  readonly description: string;
  /** May be left out of the request. */
  readonly optional: boolean;
  /** What the service takes where it is left out; undefined where nothing is taken. */
  readonly default?: unknown;
  readonly example?: unknown;
}

interface Measured extends Described {
  /** The unit on the wire; empty for a plain number. */
  readonly unit: string;
}

export interface NumberField extends Measured {
  readonly kind: 'number';
}

/** A number, {re, im} or {magnitude, angle_deg}, typed as one text. */
export interface ComplexField extends Measured {
  readonly kind: 'complex';
}

export interface NumbersField extends Measured {
  readonly kind: 'numbers';
}

/** A list of complex numbers; on the wire a list, or an object of two columns. */
export interface ComplexesField extends Measured {
  readonly kind: 'complexes';
  readonly columns: boolean;
}

export interface ChoiceField extends Described {
  readonly kind: 'choice';
  readonly options: readonly string[];
}

/** Any of several words. */
export interface ChoicesField extends Described {
  readonly kind: 'choices';
  readonly options: readonly string[];
}

export interface BooleanField extends Described {
  readonly kind: 'boolean';
}

export interface TextField extends Described {
  readonly kind: 'text';
}

/** A word that the schema fixes: "open", or nothing more to say after a choice. */
export interface ConstantField extends Described {
  readonly kind: 'constant';
  readonly value: unknown;
}

/** A list of records that hold numbers only: typed as lines of columns, as they come out of a spreadsheet. */
export interface RowsField extends Described {
  readonly kind: 'rows';
  readonly columns: readonly { readonly name: string; readonly field: NumberField | ComplexField }[];
}

export interface Member {
  readonly name: string;
  readonly field: Field;
}

export interface GroupField extends Described {
  readonly kind: 'group';
  readonly members: readonly Member[];
}

export interface Variant {
  /** Stable, and free of dots: part of a path. */
  readonly key: string;
  readonly label: string;
  /** Made when asked for: an element of a cascade may be a cascade. */
  field(): Field;
}

export interface UnionField extends Described {
  readonly kind: 'union';
  readonly variants: readonly Variant[];
  /** The member that tells objects of this union apart, where there is one. */
  readonly variantOf: (input: unknown) => Variant | undefined;
}

export interface ListField extends Described {
  readonly kind: 'list';
  item(): Field;
  readonly least: number;
  readonly most: number;
}

/** What has no form of its own: typed as JSON. */
export interface JsonField extends Described {
  readonly kind: 'json';
}

export type Field =
  | NumberField
  | ComplexField
  | NumbersField
  | ComplexesField
  | ChoiceField
  | ChoicesField
  | BooleanField
  | TextField
  | ConstantField
  | RowsField
  | GroupField
  | UnionField
  | ListField
  | JsonField;

/** Fits half the width of the form. */
export function isShort(field: Field): boolean {
  return ['number', 'complex', 'choice', 'boolean'].includes(field.kind);
}

/** Has a legend of its own. */
export function isComposite(field: Field): boolean {
  return ['group', 'union', 'list', 'rows', 'numbers', 'complexes', 'choices'].includes(field.kind);
}
