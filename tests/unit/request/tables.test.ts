/** Materials and gauges as the API answers them: every number, its source, and a refusal that names the field. */
import { describe, expect, it } from 'vitest';
import { listGauges, listMaterials, readAwgGauge, readMetricGauge } from '@/app/api/v1/_request/tables';
import { Refusal } from '@/app/api/v1/_request/refusal';
import type { Reply } from '@/app/api/v1/_request/respond';
import { fieldErrors } from '@/lib/problems/field-errors';
import { conductors, dielectrics } from '@/lib/solvers/materials';
import * as operations from '@/openapi/operations/tables';

const query = (given: Record<string, unknown> = {}) => operations.gaugeQuery.parse(given);
const body = (reply: Reply) => JSON.parse(reply.body!);
const refusalOf = (run: () => unknown): Refusal => {
  try {
    run();
  } catch (error) {
    if (error instanceof Refusal) return error;
  }
  throw new Error('not refused');
};

describe('GET /materials', () => {
  it('lists every material in the shape that the document shows', () => {
    const { conductors: metals, dielectrics: fills } = operations.listMaterials.answers[200]!.schema!.parse(body(listMaterials())) as { conductors: { name: string }[]; dielectrics: { name: string }[] };
    expect(metals.map(({ name }) => name)).toEqual(conductors.map(({ name }) => name));
    expect(fills.map(({ name }) => name)).toEqual(dielectrics.map(({ name }) => name));
  });
});

describe('GET /gauges', () => {
  it('has all AWG numbers and the metric sizes, each as the read of that gauge gives it', () => {
    const table = operations.listGauges.answers[200]!.schema!.parse(body(listGauges(query({ conductor: 'aluminium', temperature_c: '75' })))) as { awg: { data: Record<string, unknown>[] }; metric: { data: Record<string, unknown>[] } };
    expect(table.awg.data).toHaveLength(60);
    expect(table.awg.data[0]!.number).toBe('0000');
    for (const row of table.awg.data) expect(body(readAwgGauge(String(row.number), query({ conductor: 'aluminium', temperature_c: '75' })))).toMatchObject(row);
    for (const row of table.metric.data) expect(body(readMetricGauge(String(row.nominal_size), query({ conductor: 'aluminium', temperature_c: '75' })))).toMatchObject(row);
  });

  it('answers 24 AWG of copper at 20 degC, and warmer by the linear law', () => {
    const wire = body(readAwgGauge('24', query()));
    expect(operations.readAwgGauge.answers[200]!.schema!.safeParse(wire).error).toBeUndefined();
    expect(wire).toMatchObject({ number: '24', conductor: 'copper', temperature_c: 20 });
    expect(wire.resistance_ohm_per_m).toBeCloseTo(0.0842, 4);
    expect(wire.source).toContain('IEC 60028');
    expect(body(readAwgGauge('24', query({ temperature_c: '70' }))).resistance_ohm_per_m / wire.resistance_ohm_per_m).toBeCloseTo(1 + 50 * 0.00393, 12);
    expect(body(readAwgGauge('24', query({ conductor: 'perfect' }))).resistance_ohm_per_m).toBe(0);
  });

  it('takes 4/0 however the slash arrives, and a metric size in any plain writing', () => {
    for (const text of ['0000', '4/0', '4%2F0', '4%2f0']) expect(body(readAwgGauge(text, query())).number).toBe('0000');
    const wire = body(readMetricGauge('01.50', query()));
    expect(operations.readMetricGauge.answers[200]!.schema!.safeParse(wire).error).toBeUndefined();
    expect(wire).toMatchObject({ nominal_size: '1.5', area_m2: 1.5e-6 });
    expect(body(readMetricGauge('10.00', query())).nominal_size).toBe('10');
    expect(body(readMetricGauge('0.000001', query())).nominal_size).toBe('0.000001');
  });

  it('answers 404 to a gauge that there is not, and says which there are', () => {
    for (const text of ['57', '-1', '4/1', 'x', '%', '']) expect(refusalOf(() => readAwgGauge(text, query())).status).toBe(404);
    expect(refusalOf(() => readAwgGauge('57', query())).message).toContain('0000 (4/0) to 56');
    for (const text of ['0', '10001', '1e1', '1,5', '']) expect(refusalOf(() => readMetricGauge(text, query())).status).toBe(404);
  });

  it('names every wrong query field at once', () => {
    const wrong = operations.gaugeQuery.safeParse({ conductor: 'wood', temperature_c: 'warm', colour: 'red' }, { reportInput: true });
    expect(fieldErrors(wrong.error!.issues).map(({ pointer }) => pointer).sort()).toEqual(['/colour', '/conductor', '/temperature_c']);
    for (const temperature_c of ['', ' ', '0x10', 'NaN', 'Infinity', '-274', '1e9', '1e999']) expect(operations.gaugeQuery.safeParse({ temperature_c }).success, temperature_c).toBe(false);
    for (const temperature_c of ['-40', '+85', '2e1', '.5', '20.']) expect(query({ temperature_c }).temperature_c).toBe(Number(temperature_c));
  });

  it('refuses with 422 a temperature at which the linear law has run below zero', () => {
    const refusal = refusalOf(() => readAwgGauge('24', query({ temperature_c: '-273.15' })));
    expect([refusal.status, refusal.errors[0]!.parameter]).toEqual([422, 'temperature_c']);
  });
});
