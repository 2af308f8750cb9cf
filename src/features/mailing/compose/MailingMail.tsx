import { Head, Heading, Html, Img, Link, Preview, Text } from '@react-email/components';
import type { CSSProperties, ReactNode } from 'react';
import type { Block } from './mailing-blocks';

/*
 * The mail as HTML. Mail programs read neither our style sheet nor our fonts, so styles stand in the elements, on opaque
 * grounds; the few classes serve the dark theme and narrow windows where a program honours them. Never shown as part of
 * a page of the site, whose policy forbids styles in elements.
 */
const FONT = "Figtree,'Segoe UI',Helvetica,Arial,sans-serif";
const INK = '#231c2b';
const SOFT = '#5d5366';
const PLUM = '#6d2e5b';
const LINE = '#cfddd6';

const MEDIA = `:root{color-scheme:light dark;supported-color-schemes:light dark}
@media(max-width:480px){.c{padding-left:20px!important;padding-right:20px!important}.h{font-size:28px!important;line-height:32px!important}}
@media(prefers-color-scheme:dark){.g{background-color:#141019!important}.p{background-color:#1f1927!important;border-color:#3a3145!important}.i{color:#f2eef5!important}.s{color:#b9aec2!important}.l{color:#e0aed1!important}.r{border-color:#3a3145!important}.u b{color:#f2eef5!important;border-color:#e0aed1!important}.a{background-color:#e0aed1!important}.a a{color:#1f1927!important}.n{background-color:#3b2a12!important}.n *{color:#f2eef5!important}}`;

export interface MailingMailProps {
  readonly blocks: readonly Block[];
  readonly title: string;
  /** Shown beside the subject by many mail programs. */
  readonly firstWords: string;
}

export function MailingMail({ blocks, title, firstWords }: MailingMailProps) {
  return (
    <Html lang="en">
      <Head>
        <meta name="color-scheme" content="light dark" />
        <meta name="supported-color-schemes" content="light dark" />
        <meta name="viewport" content="width=device-width" />
        <title>{title}</title>
        <style>{MEDIA}</style>
      </Head>
      <body className="g" style={{ margin: 0, padding: 0, backgroundColor: '#eaf3ef' }}>
        <Preview>{firstWords}</Preview>
        <table
          role="presentation"
          width="100%"
          cellPadding={0}
          cellSpacing={0}
          border={0}
          className="g"
          style={{ backgroundColor: '#eaf3ef' }}
        >
          <tbody>
            <tr>
              <td align="center" style={{ padding: '24px 0' }}>
                <table
                  role="presentation"
                  width="100%"
                  cellPadding={0}
                  cellSpacing={0}
                  border={0}
                  className="p"
                  style={{
                    width: '100%',
                    maxWidth: 600,
                    backgroundColor: '#ffffff',
                    border: `1px solid ${LINE}`,
                    textAlign: 'left',
                  }}
                >
                  <tbody>
                    <tr>
                      <td>
                        {blocks.map((block, i) => (
                          <BlockView key={i} block={block} />
                        ))}
                      </td>
                    </tr>
                  </tbody>
                </table>
              </td>
            </tr>
          </tbody>
        </table>
      </body>
    </Html>
  );
}

const text = (size: number, line: number, more: CSSProperties = {}): CSSProperties => ({
  margin: 0,
  font: `400 ${size}px/${line}px ${FONT}`,
  color: INK,
  ...more,
});

function BlockView({ block }: { readonly block: Block }) {
  switch (block.type) {
    case 'masthead':
      return <Masthead {...block} />;
    case 'title':
      return (
        <Part top={28}>
          <Heading as="h1" className="h i" style={text(36, 40, { fontWeight: 800, letterSpacing: '-.03em' })}>
            {block.text}
          </Heading>
        </Part>
      );
    case 'paragraph':
      return (
        <Part top={16}>
          <Text className="i" style={text(18, 28, { whiteSpace: 'pre-line' })}>
            {block.text}
          </Text>
        </Part>
      );
    case 'picture':
      return (
        <Part top={24}>
          <Img
            src={block.url}
            width={block.width}
            height={block.height}
            alt={block.alt}
            className="i"
            style={{ width: '100%', maxWidth: block.width, height: 'auto', ...text(16, 24) }}
          />
        </Part>
      );
    case 'rows':
      return <Rows rows={block.rows} />;
    case 'button':
      return (
        <Part top={24}>
          <table role="presentation" cellPadding={0} cellSpacing={0} border={0}>
            <tbody>
              <tr>
                <td className="a" style={{ backgroundColor: PLUM }}>
                  <Link
                    href={block.url}
                    style={{
                      display: 'block',
                      padding: '13px 28px 14px',
                      font: `600 16px/22px ${FONT}`,
                      color: '#ffffff',
                      textDecoration: 'none',
                    }}
                  >
                    {block.label}
                  </Link>
                </td>
              </tr>
            </tbody>
          </table>
        </Part>
      );
    case 'correction':
      return (
        <Part top={24}>
          <div
            className="n"
            style={{ padding: '16px 20px', backgroundColor: '#fdf0dc', borderLeft: '4px solid #a65a00' }}
          >
            <Text style={text(16, 26, { whiteSpace: 'pre-line' })}>
              <b style={{ fontWeight: 600 }}>{block.title}.</b> {block.text}
            </Text>
          </div>
        </Part>
      );
    case 'footer':
      return (
        <>
          <Part top={32}>
            <div style={{ borderTop: '2px dashed #a39cab', fontSize: 0, lineHeight: 0 }}>&nbsp;</div>
          </Part>
          <Part top={20} bottom={28}>
            <Text className="s" style={text(14, 22, { color: SOFT })}>
              {block.why}
              <br />
              {block.links.map(({ label, url }, i) => (
                <span key={label}>
                  {i > 0 ? '\u00a0· ' : ''}
                  <Link href={url} className="l" style={{ color: PLUM, textDecoration: 'underline' }}>
                    {label}
                  </Link>
                </span>
              ))}
              <br />
              {block.sender}
            </Text>
          </Part>
        </>
      );
  }
}

function Part({
  top,
  bottom = 0,
  children,
}: {
  readonly top: number;
  readonly bottom?: number;
  readonly children: ReactNode;
}) {
  return (
    <table role="presentation" width="100%" cellPadding={0} cellSpacing={0} border={0}>
      <tbody>
        <tr>
          <td className="c" style={{ padding: `${top}px 32px ${bottom}px` }}>
            {children}
          </td>
        </tr>
      </tbody>
    </table>
  );
}

/** Sixteenths as a ruler has them: long at the inch, then half, quarter and the rest. */
const tickHeight = (i: number): number => (i % 8 === 0 ? 12 : i % 4 === 0 ? 8 : i % 2 === 0 ? 6 : 4);

function Masthead({ name, url, link }: Extract<Block, { type: 'masthead' }>) {
  return (
    <>
      <Part top={20} bottom={8}>
        <table role="presentation" width="100%" cellPadding={0} cellSpacing={0} border={0}>
          <tbody>
            <tr>
              <td className="i" style={{ font: `800 22px/28px ${FONT}`, letterSpacing: '-.03em', color: INK }}>
                {name}
              </td>
              <td align="right" style={{ font: `400 14px/20px ${FONT}` }}>
                <Link href={url} className="l" style={{ color: PLUM, textDecoration: 'underline' }}>
                  {link}
                </Link>
              </td>
            </tr>
          </tbody>
        </table>
      </Part>
      <table
        role="presentation"
        width="100%"
        cellPadding={0}
        cellSpacing={0}
        border={0}
        style={{ tableLayout: 'fixed', lineHeight: 0, fontSize: 0 }}
      >
        <tbody>
          <tr style={{ verticalAlign: 'top' }}>
            {Array.from({ length: 41 }, (_, i) => (
              <td key={i}>
                <div style={{ width: 1, height: tickHeight(i), background: '#8b8092' }} />
              </td>
            ))}
          </tr>
        </tbody>
      </table>
    </>
  );
}

function Rows({ rows }: Pick<Extract<Block, { type: 'rows' }>, 'rows'>) {
  const line = `1px solid ${LINE}`;
  return (
    <Part top={20}>
      <table width="100%" cellPadding={0} cellSpacing={0} border={0} style={{ borderCollapse: 'collapse' }}>
        <tbody>
          {rows.map(({ label, value }) => (
            <tr key={label}>
              <th
                scope="row"
                align="left"
                className="s r"
                style={{
                  padding: '7px 16px 7px 0',
                  borderBottom: line,
                  verticalAlign: 'top',
                  ...text(14, 22, { color: SOFT }),
                }}
              >
                {label}
              </th>
              <td
                className="i r u"
                style={{ padding: '7px 0', borderBottom: line, ...text(16, 26, { fontWeight: 600 }) }}
              >
                {value}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </Part>
  );
}
