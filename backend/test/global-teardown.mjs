/** Stops and removes the throwaway PostgreSQL of the test run. */
export default async function tearDown() {
  await globalThis.deltaproofTestCluster?.stop();
}
