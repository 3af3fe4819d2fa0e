import { readInHospital, theProgram } from '../db/in-hospital';
import { DatabaseUnavailable } from '../db/faults';
import { sql } from 'drizzle-orm';
import type { Deps } from '../http/deps';

/** Whether the database answers right now. */
export async function isDatabaseUp(deps: Deps): Promise<boolean> {
  try {
    await readInHospital(deps.db, theProgram(), (tx) => tx.execute(sql`select 1`));
    return true;
  } catch (error) {
    if (error instanceof DatabaseUnavailable) return false;
    throw error;
  }
}
