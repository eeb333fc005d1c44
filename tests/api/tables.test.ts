import { afterAll, describe, expect, test } from 'vitest';
import { closeDatabase } from '@/db/connection';
import { call } from '../support/client';

afterAll(closeDatabase);

const get = (path: string) => call('GET', `/api/v1${path}`, { from: '127.3.0.7' });

describe('the tables', () => {
  test('answer a stranger with materials, and with every gauge in the table under its own path', async () => {
    expect((await get('/materials')).body.conductors[0]).toMatchObject({ name: 'copper', resistivity_ohm_m: 1 / 58e6 });
    const { body } = await get('/gauges?conductor=silver&temperature_c=-40');
    for (const row of [body.awg.data[0], body.awg.data[27], body.awg.data.at(-1)]) expect((await get(`/gauges/awg/${row.number}?conductor=silver&temperature_c=-40`)).body).toMatchObject(row);
    for (const row of [body.metric.data[0], body.metric.data[3]]) expect((await get(`/gauges/metric/${row.nominal_size}?temperature_c=-40&conductor=silver`)).body).toMatchObject(row);
  });

  test('take 4/0 with its slash written as %2F', async () => {
    for (const text of ['4%2F0', '4%2f0', '0000']) expect((await get(`/gauges/awg/${text}`)).body, text).toMatchObject({ number: '0000', diameter_m: expect.closeTo(0.011684, 12) });
  });

  test('answer 404 to a gauge that there is not', async () => {
    for (const path of ['/gauges/awg/57', '/gauges/awg/4/0', '/gauges/awg/%2F', '/gauges/metric/0', '/gauges/metric/1,5', '/gauges/metric', '/gauges/none/1']) expect((await get(path)).status, path).toBe(404);
  });

  test('answer 422 to a wrong query, and name every wrong field', async () => {
    for (const path of ['/gauges', '/gauges/awg/24', '/gauges/metric/1.5']) {
      const answer = await get(`${path}?conductor=wood&temperature_c=&colour=red`);
      expect(answer.status).toBe(422);
      expect(answer.body.errors.map(({ parameter }: { parameter: string }) => parameter).sort()).toEqual(['colour', 'conductor', 'temperature_c']);
      expect((await get(`${path}?temperature_c=-273.15`)).body.errors).toMatchObject([{ parameter: 'temperature_c' }]);
    }
  });
});
