import { sqlite } from '@/db/client.server';
import type { UnitPart } from '@/features/mailing/compose/unit-parts';

/** Tuesday 3 March 2026, 10:00 UTC. */
export const NOON = Date.UTC(2026, 2, 3, 10);
export const MINUTE = 60_000;

export function addAuthor(id = 'ines', role = 'author'): void {
  sqlite()
    .prepare('INSERT INTO user (id, name, email, email_key, role) VALUES (@id, @name, @email, @email, @role)')
    .run({ id, name: id === 'ines' ? 'Ines Thornbury' : id, email: `${id}@quilletlane.example`, role });
}

export function addProject(id = 'seed-box', author = 'ines'): void {
  sqlite()
    .prepare(
      "INSERT INTO project (id, author_id, slug, title, pattern, sizing, write_up) VALUES (@id, @author, @id, 'Seed box', '{}', '{}', '{}')",
    )
    .run({ id, author });
}

export function addSubscriber(
  id: string,
  { email = `${id}@mail.example`, state = 'confirmed', units = 'in', name = null as string | null } = {},
): void {
  sqlite()
    .prepare(
      `INSERT INTO subscriber (id, name, email, email_key, state, units, leave_token, confirmed_at)
       VALUES (@id, @name, @email, lower(@email), @state, @units, 'token-' || @id, CASE WHEN @state = 'pending' THEN NULL ELSE @confirmed END)`,
    )
    .run({ id, name, email, state, units, confirmed: Date.UTC(2026, 1, 2) });
}

const part = (units: string): UnitPart => ({
  insideHtml: `<b>inside in ${units}</b>`,
  insideText: `inside in ${units}`,
  outsideHtml: `<b>outside in ${units}</b>`,
  outsideText: `outside in ${units}`,
  projectUrl: `http://localhost:4321/projects/seed-box?units=${units}`,
});

/** A mailing that has been compiled and given to the worker, as `beginSending` leaves it. */
export function addMailing(id = 'm1', { edition = 1, at = NOON, project = 'seed-box' } = {}): void {
  const slots = ['greeting', 'inside', 'project-url', 'leave-url'].map((name) => `\uE000${name}\uE001`).join('\n');
  sqlite()
    .prepare(
      `INSERT INTO mailing (id, project_id, edition, author_id, state, subject, greeting, excerpt, html, text, unit_parts, message_date, from_name, reply_to)
       VALUES (@id, @project, @edition, 'ines', 'preparing', 'New: Seed box', 'Hello [name],', 'Words.', @html, @text, @parts, @at, 'Ines Thornbury, Seed Circle', 'ines@quilletlane.example')`,
    )
    .run({
      id,
      edition,
      at,
      project,
      html: `<p>${slots}</p>`,
      text: slots,
      parts: JSON.stringify({ in: part('in'), mm: part('mm'), cm: part('cm') }),
    });
}

export const deliveryOf = (subscriber: string) =>
  sqlite().prepare('SELECT * FROM delivery WHERE subscriber_id = ?').get(subscriber) as {
    state: string;
    attempts: number;
    unknowns: number;
    next_at: number;
    message_id: string;
    phase: string;
    code: number | null;
    reply: string;
  };
export const mailingState = (id = 'm1') =>
  sqlite().prepare('SELECT state FROM mailing WHERE id = ?').pluck().get(id) as string;
