import { eq } from 'drizzle-orm';
import { config } from '@/config.server';
import { db } from '@/db/client.server';
import { settings } from '@/db/schema';
import { DEMO_PEOPLE, type DemoPerson } from '@/features/demo/people';

/** The demo's sign-ins, for the sign-in page: only on a local site whose database was filled with the demo. */
export function demoSignIns(): readonly DemoPerson[] {
  const seeded = config.demo && db.select().from(settings).where(eq(settings.key, 'demo')).get();
  return seeded ? DEMO_PEOPLE : [];
}
