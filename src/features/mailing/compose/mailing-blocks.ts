import { slot, withoutSlots } from './slots';

/** What a mailing consists of, once: the HTML and its plain twin are both drawn from these. */
export type Block =
  | { readonly type: 'masthead'; readonly name: string; readonly url: string; readonly link: string }
  | { readonly type: 'title'; readonly text: string }
  | { readonly type: 'paragraph'; readonly text: string }
  | {
      readonly type: 'picture';
      readonly url: string;
      readonly width: number;
      readonly height: number;
      readonly alt: string;
    }
  | { readonly type: 'rows'; readonly rows: readonly { readonly label: string; readonly value: string }[] }
  | { readonly type: 'button'; readonly label: string; readonly url: string }
  | { readonly type: 'correction'; readonly title: string; readonly text: string }
  | {
      readonly type: 'footer';
      readonly why: string;
      readonly links: readonly { readonly label: string; readonly url: string }[];
      readonly sender: string;
    };

export interface MailingFacts {
  readonly siteUrl: string;
  readonly title: string;
  readonly excerpt: string;
  readonly edition: number;
  readonly correctionNote: string;
  readonly picture: {
    readonly url: string;
    readonly width: number;
    readonly height: number;
    readonly alt: string;
  } | null;
  /** Rows that are the same in every unit, after the sizes. */
  readonly rows: readonly { readonly label: string; readonly value: string }[];
  readonly authorName: string;
  readonly listName: string;
  readonly postalAddress: string;
}

/** In mails a picture is as wide as the column; taller ones are as they are. */
export const COLUMN = 536;

export function mailingBlocks(facts: MailingFacts): readonly Block[] {
  const typed = withoutSlots;
  const { picture, correctionNote } = facts;
  return [
    { type: 'masthead', name: 'Foldwright', url: slot('project-url'), link: 'Read it on the web' },
    { type: 'title', text: typed(facts.title) },
    { type: 'paragraph', text: slot('greeting') },
    ...paragraphs(typed(facts.excerpt)).map((text) => ({ type: 'paragraph', text }) as const),
    ...(picture ? [{ type: 'picture', ...picture, alt: typed(picture.alt) } as const] : []),
    ...(correctionNote && facts.edition > 1
      ? [
          {
            type: 'correction',
            title: `If you have cut edition ${facts.edition - 1}`,
            text: typed(correctionNote),
          } as const,
        ]
      : []),
    {
      type: 'rows',
      rows: [
        { label: 'Finished, inside', value: slot('inside') },
        { label: 'Finished, outside', value: slot('outside') },
        ...facts.rows.map(({ label, value }) => ({ label, value: typed(value) })),
      ],
    },
    { type: 'button', label: 'Make it at your size', url: slot('project-url') },
    {
      type: 'footer',
      why: `You get this because you confirmed ${slot('address')} on ${slot('confirmed-on')}. We count nothing: no pixels, no rewritten links.`,
      links: [
        { label: 'Leave this list', url: slot('leave-url') },
        { label: 'Change what you get', url: slot('preferences-url') },
      ],
      sender: [facts.authorName, facts.postalAddress || facts.listName].map(typed).join(', '),
    },
  ];
}

const paragraphs = (text: string): readonly string[] =>
  text
    .split(/\n\s*\n/)
    .map((part) => part.trim())
    .filter(Boolean);
