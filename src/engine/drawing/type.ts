/** Advances of the signs from space to ~ in Figtree at weight 600, figures all of one width: how far past the space, each a 12/1000 of the size. */
const ADVANCES = '5:@UOcV3??IU5C4CUUUUUUUUUU88UUUKs[S]ZRN__8MVMhabRbVSP[\\rWUU<C<PE5LRNRN@RP58L4hOQRQ?GAONdKOIA6AU';
/** Drawing units: the type of figures and labels. */
const SIZE = 13;
/** Of what has no advance above: other letters, and narrow spaces. */
const OTHER = 0.79;
const NARROW = 0.125;
/** Figures of a fraction, its slash. */
const SMALL = 0.36;
const SLASH = 0.22;

/** What a line of type takes: tall, with a little room above and below; and from its middle down to where letters stand. */
export const TALL = 14;
export const DROP = 4;

/** Width in drawing units of a figure or label, as set on a page; a little more rather than less. */
export function textWidth(text: string): number {
  let width = 0;
  text.split(/(\d+\u2044\d+)/).forEach((part, index) => {
    if (index % 2 === 1) width += SLASH + SMALL * (part.length - 1);
    else for (const mark of part) width += mark === '\u202f' ? NARROW : advanceOf(mark);
  });
  return width * SIZE;
}
function advanceOf(mark: string): number {
  const known = ADVANCES.charCodeAt(mark.charCodeAt(0) - 32);
  return Number.isNaN(known) ? OTHER : (known - 32) * 0.012;
}
