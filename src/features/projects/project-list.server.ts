import { desc, eq, sql } from 'drizzle-orm';
import { db } from '@/db/client.server';
import { editions, projects, users } from '@/db/schema';
import {
  compilePattern,
  drawFolded,
  drawPiece,
  evaluate,
  show,
  type Figures,
  type GridId,
  type Model,
  type PieceFigure,
  type Unit,
} from '@/engine';
import { drawingSvg } from '@/exports/svg/drawing';
import type { ProjectList, ProjectSummary } from './project';
import { differenceWords, stageOf } from './project-stage';
import { workedOnBy, type Asker } from './project-access.server';
import { blocking, proofList } from './proof';

const MM_AN_INCH = 25.4;
/** The place for flat pieces in a row, in pixels; nothing is drawn larger than ten pixels an inch. */
const FLAT = { width: 150, height: 108, pixelsAnInch: 10, inset: 6, gap: 4 } as const;
const FOLDED = { width: 96, height: 100 } as const;

type Row = ReturnType<typeof rowsFor>[number];
interface Pictured {
  readonly row: Row;
  readonly worked: { readonly model: Model; readonly figures: Figures } | null;
  readonly pieces: readonly PieceFigure[];
}

/** The projects that the asker works on, last touched first; an admin's list holds everybody's. All flat pictures share one scale. */
export function listProjects(asker: Asker): ProjectList {
  const pictured = rowsFor(asker).map(picture);
  const pixelsAnInch = commonScale(pictured.flatMap(({ pieces }) => pieces));
  return { pixelsAnInch, projects: pictured.map((item) => summary(item, pixelsAnInch)) };
}

function rowsFor(asker: Asker) {
  return db
    .select({
      project: projects,
      authorName: users.name,
      editionCount: sql<number>`(select count(*) from ${editions} where ${editions.projectId} = ${projects.id})`,
    })
    .from(projects)
    .innerJoin(users, eq(projects.authorId, users.id))
    .where(workedOnBy(asker))
    .orderBy(desc(projects.updatedAt), projects.id)
    .all();
}

function picture(row: Row): Pictured {
  const compiled = compilePattern(row.project.pattern);
  if (!compiled.ok) return { row, worked: null, pieces: [] };
  const figures = evaluate(compiled.value, row.project.sizing);
  // The pieces that say most about a box are the large ones with scores.
  const scored = figures.pieces.filter((piece) => piece.net.folds.length > 0);
  const pieces = [...(scored.length > 0 ? scored : figures.pieces)].sort((a, b) => b.area - a.area).slice(0, 2);
  return { row, worked: { model: compiled.value, figures }, pieces };
}

function commonScale(pieces: readonly PieceFigure[]): number {
  const across = Math.max(0, ...pieces.map((piece) => piece.across)) / MM_AN_INCH;
  const along = Math.max(0, ...pieces.map((piece) => piece.along)) / MM_AN_INCH;
  return Math.min(
    FLAT.pixelsAnInch,
    across > 0 ? FLAT.width / across : FLAT.pixelsAnInch,
    along > 0 ? FLAT.height / along : FLAT.pixelsAnInch,
  );
}

function summary({ row, worked, pieces }: Pictured, pixelsAnInch: number): ProjectSummary {
  const { project, authorName, editionCount } = row;
  const { units, grid } = project.sizing;
  const stage = stageOf({ ...project, editions: editionCount });
  const items = proofList(
    { ...project },
    worked ? { figures: worked.figures, compiled: { ok: true, value: worked.model } } : {},
  );
  const stops = blocking(items).length;
  return {
    id: project.id,
    slug: project.slug,
    title: project.title,
    patternName: project.pattern.name,
    size: worked ? sizeWords(worked.figures, { units, grid }) : '',
    stage,
    difference: stage.stage === 'changed' ? differenceOf(row) : '',
    blocking: stops,
    advisory: items.length - stops,
    revision: project.revision,
    updatedAt: project.updatedAt.getTime(),
    author: { id: project.authorId, name: authorName ?? 'Unnamed' },
    flat: thatFit(pieces, pixelsAnInch / MM_AN_INCH).map((piece) =>
      flatSvg(piece, { units, grid, scale: pixelsAnInch / MM_AN_INCH }),
    ),
    folded: worked ? drawingSvg(drawFolded(worked.model, worked.figures, FOLDED)) : null,
    words: [...project.pattern.pieces, ...project.pattern.measures, ...project.pattern.choices]
      .map((item) => item.name)
      .join(' '),
  };
}

/** Both pieces where they fit beside or above one another, the larger one alone where they do not. */
function thatFit(pieces: readonly PieceFigure[], scale: number): readonly PieceFigure[] {
  const [first, second] = pieces;
  if (first === undefined || second === undefined) return pieces;
  const room = 2 * FLAT.inset;
  const beside = (first.across + second.across) * scale + 2 * room + FLAT.gap <= FLAT.width + room;
  const above = (first.along + second.along) * scale + 2 * room <= FLAT.height + room;
  return beside || above ? pieces : [first];
}

function flatSvg(
  piece: PieceFigure,
  options: { readonly units: Unit; readonly grid: GridId; readonly scale: number },
): string {
  return drawingSvg(
    drawPiece(piece, { ...options, width: piece.across * options.scale + 2 * FLAT.inset, labels: false, dims: false }),
  );
}

/** "9 × 6 × 2 1/4 in" */
export function sizeWords(
  figures: Pick<Figures, 'finished'>,
  options: { readonly units: Unit; readonly grid: GridId },
): string {
  const sizes = figures.finished.inside.length > 0 ? figures.finished.inside : figures.finished.outside;
  return sizes.map((size, i) => show(size.mm, { ...options, bare: i < sizes.length - 1 }).typeset).join(' × ');
}

function differenceOf({ project }: Row): string {
  const newest = db
    .select()
    .from(editions)
    .where(eq(editions.projectId, project.id))
    .orderBy(desc(editions.n))
    .limit(1)
    .get();
  return newest ? differenceWords(newest, project) : '';
}
