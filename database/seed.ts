import { seedDemonstration } from './seeders';

seedDemonstration().catch((error: unknown) => {
  console.error(error instanceof Error ? (error.stack ?? error.message) : error);
  process.exit(1);
});
