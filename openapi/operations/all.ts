/** Every operation of the API, in the order of the document. */
import { calculations } from '@/lib/solvers/registry';
import type { Operation } from '../operation';
import { listCalls, readCall } from './calls';
import { computeOperation, describeOperation } from './calculations';
import { describeCalculation, listCalculations, listMethods, readMethod } from './catalogue';
import { changeKey, issueKey, listKeys, readKey, revokeKey } from './keys';
import { readDocument, readHealth, readReadiness } from './service';
import { readSession, signIn, signOut } from './session';
import { listGauges, listMaterials, readAwgGauge, readMetricGauge } from './tables';
import { readUsage } from './usage';

// An operation's precise schema types matter to its own route only.
const declared = [
  listCalculations,
  describeCalculation,
  listMethods,
  readMethod,
  listMaterials,
  listGauges,
  readAwgGauge,
  readMetricGauge,
  listCalls,
  readCall,
  readUsage,
  listKeys,
  issueKey,
  readKey,
  changeKey,
  revokeKey,
  signIn,
  readSession,
  signOut,
  readHealth,
  readReadiness,
  readDocument,
] as unknown as Operation[];

export const operations: readonly Operation[] = [
  ...calculations.flatMap((calculation) => [computeOperation(calculation), describeOperation(calculation)]),
  ...declared,
];
