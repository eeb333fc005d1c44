/** An element of a cascade, other than a cascade, as a two-port. */
import type { LineConstants } from '../lines/line-constants';
import { lineTwoPort } from '../methods/line-two-port';
import { impedance, openStub, parallelParts, seriesParts, shortStub, type OnePort } from '../methods/one-port';
import { propagation } from '../methods/telegrapher';
import { lineElementTwoPort, seriesTwoPort, shuntTwoPort, transformerTwoPort, type TwoPort } from '../methods/two-port';
import type { PortReferences } from '../methods/two-port-coordinates';
import { complexParts } from '../nouns/complex-number';
import type { Phasor, Space } from '../numeric/phasor';
import type { LeafElement } from './element';
import { givenTwoPort } from './given-two-port';

export interface Sweep {
  readonly frequenciesHz: Float64Array;
  readonly omega: Float64Array;
  /** Of the whole cascade. */
  readonly references: PortReferences;
}

/** `constants` are those of the element's line, where it has one. */
export function elementTwoPort<T extends Phasor<T>>(space: Space<T>, element: LeafElement, constants: LineConstants | undefined, { frequenciesHz, omega, references }: Sweep): TwoPort<T> {
  const lineOf = (lengthM: number) => lineTwoPort(space, constants!, propagation(constants!, frequenciesHz), lengthM);
  switch (element.kind) {
    case 'line':
      return lineElementTwoPort(space, lineOf(element.length_m));
    case 'series':
      return seriesTwoPort(space, lumped(space, element, omega));
    case 'shunt':
      return shuntTwoPort(space, lumped(space, element, omega));
    case 'open_stub':
      return shuntTwoPort(space, openStub(space, lineOf(element.length_m)));
    case 'short_stub':
      return shuntTwoPort(space, shortStub(space, lineOf(element.length_m)));
    case 'series_open_stub':
      return seriesTwoPort(space, openStub(space, lineOf(element.length_m)));
    case 'series_short_stub':
      return seriesTwoPort(space, shortStub(space, lineOf(element.length_m)));
    case 'transformer':
      return transformerTwoPort(space, element.turns_ratio);
    case 'two_port':
      return givenTwoPort(space, element, omega, references);
  }
}

function lumped<T extends Phasor<T>>(space: Space<T>, element: Extract<LeafElement, { kind: 'series' | 'shunt' }>, omega: Float64Array): OnePort<T> {
  if (element.impedance_ohm !== undefined) return impedance(space, complexParts(element.impedance_ohm));
  return element.connection === 'series' ? seriesParts(space, omega, element) : parallelParts(space, omega, element);
}
