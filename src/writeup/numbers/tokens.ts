import { FRACTION_SIGNS } from '@/engine';

/** What stands in a line of text for something that is no text, such as a live measure. */
export const THING = '\ufffc';

/** A piece of text that the finder looks at; `said` is lower case and written one way (½ is 1/2, 5/8ths is 5/8). */
export interface Token {
  readonly is: 'digits' | 'decimal' | 'fraction' | 'ordinal' | 'word' | 'time' | 'other' | 'mark';
  readonly said: string;
  readonly from: number;
  readonly to: number;
  /** It begins with a capital. */
  readonly capital: boolean;
  /** Nothing stands between this token and the one before it. */
  readonly close: boolean;
}

const KINDS: readonly (readonly [Token['is'], string])[] = [
  // Addresses, sums of money, shares, labels: never a length.
  ['other', String.raw`https?:\/\/\S+|www\.\S+|[\w.+-]+@[\w-]+\.[\w.]+`],
  ['other', String.raw`[$£€#№]\s?\d[\d.,/]*|\d[\d.,]*\s?[%‰€£°º]\s?[CFcf]?\b|\d[\d.,]*\s?[%‰€£°º]`],
  ['other', String.raw`\d{4}-\d{2}-\d{2}|\d{1,3}(?:,\d{3})+(?!\d)|\d+(?:\.\d+){2,}`],
  ['time', String.raw`\d{1,2}:\d{2}(?::\d{2})?(?!\d)`],
  ['fraction', String.raw`\d+\s?[/⁄]\s?\d+(?:['’]?(?:ths?|nds?|rds?|s))?(?![\w/⁄])`],
  ['fraction', `[${Object.keys(FRACTION_SIGNS).join('')}]`],
  ['decimal', String.raw`\d+\.\d+|\.\d+|\d+,\d{1,2}(?=\s?(?:mm|cm|milli|centi))`],
  ['ordinal', String.raw`\d+(?:st|nds?|rds?|ths?)(?![\p{L}\d])`],
  ['digits', String.raw`\d+`],
  ['word', String.raw`\p{L}+(?:['’]\p{L}+)*`],
  ['mark', String.raw`''|\S`],
];
const TOKEN = new RegExp(KINDS.map(([, source]) => `(${source})`).join('|'), 'gu');
/** A label such as A4 or B5: letters and figures without a space. */
const LABEL = /^[a-z]$/i;
const WRITTEN: Readonly<Record<string, string>> = {
  ...FRACTION_SIGNS,
  '×': 'x',
  '″': '"',
  '”': '"',
  "''": '"',
  '–': '-',
  '—': '—',
  '−': '-',
  '‑': '-',
};

/** Text as tokens, spaces left out. Offsets are those of the text. */
export function tokensOf(text: string): readonly Token[] {
  const tokens: Token[] = [];
  for (const match of text.matchAll(TOKEN)) {
    const kind = KINDS[match.slice(1).findIndex((part) => part !== undefined)];
    const from = match.index;
    const before = tokens.at(-1);
    const close = before !== undefined && before.to === from;
    let is = kind?.[0] ?? 'mark';
    if (is === 'digits' && close && before.is === 'word' && LABEL.test(before.said) && before.said !== 'x')
      is = 'other';
    const capital = /^\p{Lu}/u.test(match[0]);
    tokens.push({ is, said: written(match[0], is), from, to: from + match[0].length, capital, close });
  }
  return tokens;
}

function written(raw: string, is: Token['is']): string {
  const said = WRITTEN[raw] ?? raw.toLowerCase().replace(/’/g, "'");
  if (is === 'fraction')
    return said
      .replace(/\s/g, '')
      .replace('⁄', '/')
      .replace(/[^\d/].*$/, '');
  return is === 'decimal' ? said.replace(',', '.') : said;
}
