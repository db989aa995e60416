import { inject } from 'vitest';
import { copyDatabase, type Database } from './test-cluster';

/** A migrated database of the test file's own, empty of rows; drop it in `afterAll` when nothing is connected any more. */
export const freshDatabase = (): Promise<Database> => copyDatabase(inject('clusterUrl'), 'template');
