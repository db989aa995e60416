import { migrate } from '@mereward/db/migrate';
import type { TestProject } from 'vitest/node';
import { startTestCluster } from './test-cluster';

declare module 'vitest' {
  export interface ProvidedContext {
    clusterUrl: string;
  }
}

/** Starts one private PostgreSQL for the whole run and migrates the template its test files copy. */
export default async function setUp(project: TestProject): Promise<() => Promise<void>> {
  const cluster = await startTestCluster(async (templateUrl) => {
    await migrate(templateUrl);
  });
  project.provide('clusterUrl', cluster.url('mereward'));
  return cluster.stop;
}
