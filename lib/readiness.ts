/** Whether calls can be answered: the database is asked over the pool that admissions use. */
import { admissionDatabase } from '@/db/connection';

/** Throws what the database throws. */
export async function probeDatabase(): Promise<void> {
  await admissionDatabase().raw('select 1');
}
