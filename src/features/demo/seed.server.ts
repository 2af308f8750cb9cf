import { eq } from 'drizzle-orm';
import { db, sqlite } from '@/db/client.server';
import { projects, settings, users } from '@/db/schema';
import { createPerson, type Person } from '@/features/accounts/people.server';
import { DEMO_PEOPLE } from './people';
import { DEMO_PROJECTS } from './projects';
import { seedProject } from './seed-project.server';
import { seedMailing } from './seed-mailing.server';
import { seedSubscribers } from './seed-subscribers.server';

const DAY = 24 * 60 * 60_000;
const JOINED_DAYS_AGO = 60;

/**
 * Fills an empty database with the demo: people, nine published projects and a draft, subscribers, one mailing that was sent. All
 * of it goes through the same functions as real work, its dates spread over the weeks before `now`. It is one
 * transaction: broken off, it leaves nothing behind, and the next start fills the database whole.
 */
export async function seedDemo(now = Date.now()): Promise<void> {
  const connection = sqlite();
  connection.exec('BEGIN IMMEDIATE');
  try {
    await seed(now);
    connection.exec('COMMIT');
  } catch (error) {
    if (connection.inTransaction) connection.exec('ROLLBACK');
    throw error;
  }
}

async function seed(now: number): Promise<void> {
  const joined = new Date(now - JOINED_DAYS_AGO * DAY);
  let author: Person | undefined;
  for (const person of DEMO_PEOPLE) {
    const made = await createPerson(person);
    if (!made.ok) throw new Error(made.sentence);
    db.update(users).set({ createdAt: joined, emailVerified: joined }).where(eq(users.id, made.person.id)).run();
    if (person.role === 'author') author ??= made.person;
  }
  if (!author) throw new Error('The demo has no author.');

  seedSubscribers(now);
  for (const project of DEMO_PROJECTS) await seedProject(project, author, now);
  await seedMailing(projectCalled('Seed keeper’s book box'), author, now);
  db.insert(settings)
    .values({ key: 'demo', value: new Date(now).toISOString() })
    .run();
}

function projectCalled(title: string): string {
  const project = db.select({ id: projects.id }).from(projects).where(eq(projects.title, title)).get();
  if (!project) throw new Error(`The demo has no project called ${title}.`);
  return project.id;
}
