import { stopTestCluster } from './test-cluster.mjs';

/** Jest global tear-down of the backend. */
export default stopTestCluster;
