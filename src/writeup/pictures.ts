/** Widths in pixels that a stored picture is served in; the last is the largest that is kept. */
export const PICTURE_WIDTHS = [480, 960, 1600] as const;
export type PictureWidth = (typeof PICTURE_WIDTHS)[number];

export const pictureUrl = (id: string, width: PictureWidth): string => `/media/${id}-${width}.webp`;

/** JPEG, at most 1200 pixels wide: for mail, feeds and previews, where WebP is not a safe guess. */
export const jpegUrl = (id: string): string => `/media/${id}.jpg`;

/** The `srcset` of a picture whose kept width is given: each file with its true width, none twice. */
export function pictureSources(id: string, width: number): string {
  const sources = PICTURE_WIDTHS.map((w) => ({ url: pictureUrl(id, w), wide: Math.min(w, width) }));
  return sources
    .filter(({ wide }, n) => n === 0 || wide > (sources[n - 1]?.wide ?? 0))
    .map(({ url, wide }) => `${url} ${wide}w`)
    .join(', ');
}

/** The largest picture that is taken, in bytes: 12 MB as file managers count them. */
export const PICTURE_BYTES = 12 * 1024 * 1024;

/** What a cropped photo keeps in sight, as classes of the style sheet: the page may hold no inline styles. */
export const focusClasses = ({ across, down }: { readonly across: number; readonly down: number }): string =>
  ` focus-across-${Math.trunc(across)} focus-down-${Math.trunc(down)}`;
