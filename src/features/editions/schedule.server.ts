import { and, asc, eq, isNull, lte } from 'drizzle-orm';
import { config } from '@/config.server';
import { db } from '@/db/client.server';
import { revisions, schedules, users } from '@/db/schema';
import { scheduleLetter } from '@/features/accounts/account-letters';
import { post } from '@/features/accounts/post.server';
import type { Planned } from '@/features/projects/planned';
import { openRow, type Asker } from '@/features/projects/project-access.server';
import { keepStanding, stateOf } from '@/features/projects/revisions.server';
import {
  explainRefusal,
  freeze,
  hindranceTo,
  projectOf,
  type PublishOutcome,
  type PublishRefusal,
} from './publish.server';

const SOONEST = 60_000;
const LATEST = 366 * 24 * 60 * 60_000;

export type PlanOutcome =
  | { readonly ok: true; readonly planned: Planned }
  | { readonly ok: false; readonly refusal: PublishRefusal | { readonly code: 'bad time' }; readonly sentence: string };

/** What is planned for a project; null when nothing is, or when it is not the asker's. */
export function plannedFor(projectId: string, asker: Asker): Planned | null {
  if (openRow(db, projectId, asker) === null) return null;
  const row = db.select().from(schedules).where(eq(schedules.projectId, projectId)).get();
  return row
    ? { publishAt: row.publishAt.getTime(), revision: row.revision, note: row.note, problem: row.problem }
    : null;
}

/**
 * Plans the project as it stands in `revision` to be published at a time from a minute to a year ahead; a plan made before
 * gives way. That very revision is published, whatever is typed until then.
 */
export function planEdition(
  projectId: string,
  asker: Asker,
  wish: { readonly revision: number; readonly note: string; readonly publishAt: number },
  now = Date.now(),
): PlanOutcome {
  if (!(wish.publishAt >= now + SOONEST && wish.publishAt <= now + LATEST))
    return { ok: false, refusal: { code: 'bad time' }, sentence: 'Choose a time from a minute to a year ahead.' };
  return db.transaction(
    (tx): PlanOutcome => {
      const project = openRow(tx, projectId, asker)?.row;
      const refuse = (refusal: PublishRefusal): PlanOutcome => ({
        ok: false,
        refusal,
        sentence: explainRefusal(refusal),
      });
      if (project === undefined) return refuse({ code: 'not found' });
      if (project.revision !== wish.revision) return refuse({ code: 'changed meanwhile', revision: project.revision });
      const hindrance = hindranceTo(tx, { project, state: stateOf(project), ...wish });
      if (hindrance) return refuse(hindrance);
      keepStanding(tx, project, 'scheduled');
      const { revision, note } = wish;
      const values = { projectId, revision, note: note.trim(), publishAt: new Date(wish.publishAt), setBy: asker.id };
      tx.insert(schedules)
        .values(values)
        .onConflictDoUpdate({
          target: schedules.projectId,
          set: { ...values, problem: null, createdAt: new Date(now) },
        })
        .run();
      return { ok: true, planned: { publishAt: wish.publishAt, revision, note: note.trim(), problem: null } };
    },
    { behavior: 'immediate' },
  );
}

/** Drops what is planned. False when nothing was, or when it is not the asker's. */
export function dropPlan(projectId: string, asker: Asker): boolean {
  if (openRow(db, projectId, asker) === null) return false;
  return db.delete(schedules).where(eq(schedules.projectId, projectId)).run().changes > 0;
}

/**
 * Publishes everything whose time has come, and gives how many editions that made. Each is one immediate transaction that
 * also ends the plan, so that two processes make one edition. A plan that cannot be carried out says why and stays.
 */
export function publishDue(now = Date.now()): number {
  const due = db
    .select({ projectId: schedules.projectId })
    .from(schedules)
    .where(and(lte(schedules.publishAt, new Date(now)), isNull(schedules.problem)))
    .orderBy(asc(schedules.publishAt))
    .all();
  return due.filter(({ projectId }) => publishPlanned(projectId, now)).length;
}

function publishPlanned(projectId: string, now: number): boolean {
  const done = db.transaction(
    (tx): { outcome: PublishOutcome; setBy: string; title: string } | null => {
      const plan = tx.select().from(schedules).where(eq(schedules.projectId, projectId)).get();
      if (!plan || plan.problem !== null || plan.publishAt.getTime() > now) return null;
      const { revision, note, setBy } = plan;
      const project = projectOf(tx, projectId, setBy);
      const kept = tx
        .select({ state: revisions.state })
        .from(revisions)
        .where(and(eq(revisions.projectId, projectId), eq(revisions.n, revision)))
        .get();
      const outcome: PublishOutcome =
        project && kept
          ? freeze(tx, { project, state: kept.state, revision, note, by: setBy }, now)
          : {
              ok: false,
              refusal: { code: 'not found' },
              sentence: 'The project or its planned revision is not there any more.',
            };
      if (outcome.ok) {
        tx.delete(schedules).where(eq(schedules.projectId, projectId)).run();
        tx.update(revisions)
          .set({ kind: 'published' })
          .where(and(eq(revisions.projectId, projectId), eq(revisions.n, revision)))
          .run();
      } else tx.update(schedules).set({ problem: outcome.sentence }).where(eq(schedules.projectId, projectId)).run();
      return { outcome, setBy, title: kept?.state.title ?? '' };
    },
    { behavior: 'immediate' },
  );
  if (done === null) return false;
  tell(done.setBy, { projectId, title: done.title || 'Untitled', outcome: done.outcome });
  return done.outcome.ok;
}

function tell(
  personId: string,
  {
    projectId,
    title,
    outcome,
  }: { readonly projectId: string; readonly title: string; readonly outcome: PublishOutcome },
): void {
  const person = db.select().from(users).where(eq(users.id, personId)).get();
  if (!person || person.disabledAt) return;
  const address = outcome.ok
    ? `${config.siteUrl}/projects/${outcome.edition.slug}`
    : `${config.siteUrl}/workroom/${projectId}`;
  post(person, scheduleLetter({ address, title, problem: outcome.ok ? null : outcome.sentence }));
}

const BETWEEN = 5_000;

/** Looks every few seconds for what is due, until it is stopped. */
export function startScheduler(): { stop(): void } {
  const turn = () => {
    try {
      publishDue();
    } catch (error) {
      console.error('What was planned could not be published now; it is tried again.', error);
    }
  };
  const timer = setInterval(turn, BETWEEN);
  turn();
  return { stop: () => clearInterval(timer) };
}
