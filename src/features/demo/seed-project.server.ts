import { eq } from 'drizzle-orm';
import { db } from '@/db/client.server';
import { projects, uploads } from '@/db/schema';
import { compilePattern, evaluate, explain, usualSizing, type Pattern, type Sizing } from '@/engine';
import { publishEdition } from '@/features/editions/publish.server';
import { getPattern } from '@/features/patterns/patterns.server';
import { renderPicture } from '@/features/pictures/render-picture.server';
import { createProject, openProject, saveProject, type Asker } from '@/features/projects/projects.server';
import type { ProjectState } from '@/features/projects/project';
import { storeUpload } from '@/features/uploads/uploads.server';
import type { WriteUp } from '@/writeup/document';
import type { Build, DemoProject, ShowPicture } from './demo-project';
import { pictureSvg } from './picture';
import { photo, type StoredPicture } from './write';

const DAY = 24 * 60 * 60_000;
const PICTURE_WIDTH = 1600;

/** Makes the project from its pattern, draws its pictures, saves and publishes it as often as it has editions. */
export async function seedProject(demo: DemoProject, author: Asker, now: number): Promise<void> {
  const pattern = getPattern(demo.pattern);
  if (!pattern) throw new Error(`The demo needs the pattern ${demo.pattern}.`);
  const { id } = createProject(pattern, { title: demo.title, asker: author });
  const stored = await drawPictures(demo, {
    pattern,
    projectId: id,
    ownerId: author.id,
    at: new Date(now - demo.createdDaysAgo * DAY),
  });
  const show: ShowPicture = (name, caption) => photo(stored(name), caption);

  for (const edition of demo.editions) {
    const revision = save(id, author, demo, {
      writeUp: edition.writeUp(show),
      hero: demo.hero === null ? null : stored(demo.hero).upload,
    });
    const outcome = publishEdition(
      id,
      { by: author.id, revision, ...(edition.note === undefined ? {} : { note: edition.note }) },
      now - edition.daysAgo * DAY,
    );
    if (!outcome.ok) {
      const items =
        outcome.refusal.code === 'proof blocks'
          ? outcome.refusal.items.map(({ title, detail }) => `${title}: ${detail}`)
          : [];
      throw new Error([`${demo.title}: ${outcome.sentence}`, ...items].join('\n'));
    }
  }
  if (demo.draft) save(id, author, demo, { writeUp: demo.draft(show), hero: null });

  const touched = demo.savedDaysAgo ?? demo.editions.at(-1)?.daysAgo ?? demo.createdDaysAgo;
  db.update(projects)
    .set({ createdAt: new Date(now - demo.createdDaysAgo * DAY), updatedAt: new Date(now - touched * DAY) })
    .where(eq(projects.id, id))
    .run();
}

/** The revision that it is saved as. */
function save(
  id: string,
  author: Asker,
  demo: DemoProject,
  parts: { readonly writeUp: WriteUp; readonly hero: string | null },
): number {
  const open = openProject(id, author);
  if (!open) throw new Error(`${demo.title} cannot be opened.`);
  const { title, summary, minutes } = demo;
  const state: ProjectState = {
    ...open.state,
    ...parts,
    title,
    summary,
    minutes,
    sizing: sizingOf(open.state.sizing, demo),
  };
  const saved = saveProject(id, author, { state, revision: open.revision });
  if (!saved.ok) throw new Error(`${title} could not be saved: ${saved.code}.`);
  return saved.revision;
}

interface Surroundings {
  readonly pattern: Pattern;
  readonly projectId: string;
  readonly ownerId: string;
  readonly at: Date;
}

async function drawPictures(
  demo: DemoProject,
  { pattern, projectId, ownerId, at }: Surroundings,
): Promise<(name: string) => StoredPicture> {
  const build = builderOf(pattern, demo);
  const drawn = await Promise.all(
    Object.entries(demo.pictures).map(async ([name, { alt, scene }]) => ({
      name,
      alt,
      bytes: await renderPicture(pictureSvg(scene(build)), { width: PICTURE_WIDTH }),
    })),
  );
  const stored = new Map<string, StoredPicture>();
  for (const { name, alt, bytes } of drawn) {
    const upload = await storeUpload({ ownerId, projectId, bytes });
    if (!upload.ok) throw new Error(`${demo.title}, picture ${name}: ${upload.faults.map(explain).join(' ')}`);
    const { id, width, height } = upload.value;
    db.update(uploads).set({ createdAt: at }).where(eq(uploads.id, id)).run();
    stored.set(name, { upload: id, alt, width, height });
  }
  return (name) => {
    const picture = stored.get(name);
    if (!picture) throw new Error(`${demo.title} has no picture called ${name}.`);
    return picture;
  };
}

/** The project's box at its author's size, of a pattern that the picture may have changed. */
export function builderOf(pattern: Pattern, demo: Pick<DemoProject, 'values' | 'choices'>): Build {
  return (change = (same) => same) => {
    const compiled = compilePattern(change(pattern));
    if (!compiled.ok) throw new Error(compiled.faults.map(explain).join('\n'));
    return {
      model: compiled.value,
      figures: evaluate(compiled.value, sizingOf(usualSizing(compiled.value), demo)),
    };
  };
}

const sizingOf = (usual: Sizing, { values, choices }: Pick<DemoProject, 'values' | 'choices'>): Sizing => ({
  ...usual,
  values: { ...usual.values, ...values },
  choices: { ...usual.choices, ...choices },
});
