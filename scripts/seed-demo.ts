/**
 * Fills the empty database with the demo. A process of its own, because drawing some fifty pictures takes memory that a running site
 * would hold for as long as it runs. Ends with the one that began it.
 */
import { closeDatabase } from '@/db/client.server';
import { seedDemo } from '@/features/demo/seed.server';

process.once('disconnect', () => process.exit(1));
await seedDemo();
closeDatabase();
process.exit(0);
