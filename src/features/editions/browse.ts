/** What the list of projects was asked for, in its address. */
export interface Browse {
  readonly query: string;
  readonly kinds: readonly string[];
  readonly order: 'newest' | 'title';
  /** From 1. */
  readonly page: number;
}

export const PAGE_SIZE = 24;
const LONGEST_QUERY = 200;

export function readBrowse(params: URLSearchParams): Browse {
  const page = Number(params.get('page') ?? 1);
  return {
    query: (params.get('q') ?? '').trim().slice(0, LONGEST_QUERY),
    kinds: [...new Set(params.getAll('kind').filter((kind) => kind !== ''))].slice(0, 20),
    order: params.get('sort') === 'title' ? 'title' : 'newest',
    page: Number.isInteger(page) && page > 0 && page < 10_000 ? page : 1,
  };
}

/** The address that asks for this; what is usual is left away. */
export function browseHref({ query, kinds, order, page }: Browse): string {
  const params = new URLSearchParams();
  if (query !== '') params.set('q', query);
  for (const kind of kinds) params.append('kind', kind);
  if (order !== 'newest') params.set('sort', order);
  if (page !== 1) params.set('page', String(page));
  const text = params.toString();
  return text === '' ? '/projects' : `/projects?${text}`;
}
