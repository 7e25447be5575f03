/** Copies the database while it is in use: `npm run backup`. To go back to a copy, stop Hilum and put it in the database's place. */
import { backUpDatabase } from '@/db/backup';

try {
  const { file, sizeBytes } = await backUpDatabase(new Date());
  console.log(`Copied the database to ${file} (${(sizeBytes / 1_000_000).toFixed(1)} MB, checked).`);
} catch (error) {
  console.error(error instanceof Error ? error.message : error);
  process.exitCode = 1;
}
