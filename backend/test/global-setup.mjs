import { startTestCluster, stopTestCluster } from './test-cluster.mjs';

/** Jest global set-up of the backend: one throwaway PostgreSQL, from which every test file gets a database of its own. */
export default async function setUp() {
  try {
    process.env.TEST_CLUSTER_URL = await startTestCluster();
  } catch (error) {
    await stopTestCluster();
    throw error;
  }
}
