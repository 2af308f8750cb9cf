import { useStore } from '@nanostores/react';
import type { Editor } from '@tiptap/core';
import { NodeSelection } from '@tiptap/pm/state';
import { EditorContent, useEditor, useEditorState } from '@tiptap/react';
import type { ReadableAtom } from 'nanostores';
import { useEffect, useRef, useState } from 'react';
import { WRITE_UP_VERSION, type DocNode, type WriteUp } from '../document';
import type { FiguresStore } from '../figures-store';
import type { LiveText } from '../live';
import { usesOf } from '../nodes/measure/view';
import { storedForm } from '../stored-form';
import { collectUses } from '../uses';
import type { EditingDesk } from './editing-desk';
import { editorExtensions } from './extensions';
import { LinkField } from './LinkField';
import { MeasureField } from './MeasureField';
import { plainPastedHtml } from './pasted-html';
import { uploadPhotos } from './photo-uploads';
import { PieceList } from './PieceList';
import { Popover } from './Popover';
import { pictureSender } from './send-picture';
import { takeDocument } from './take-document';
import { markTools, partTools, toolState } from './tools';
import { shortcut } from './shortcuts';
import { Toolbar } from './Toolbar';
import { insertPart, linkAt, putMeasure, setLink, takeNames } from './writing';

export interface WriteUpEditorProps {
  /** Read once; give the component a new `key` to begin with another. */
  readonly initial: WriteUp;
  /** What live measures, drawings and the cut list are shown at. */
  readonly figures: FiguresStore;
  /** Names of the measures that are lit, the picked one first. */
  readonly lit: ReadableAtom<readonly string[]>;
  /** The write-up each time that names in it were changed outside the editor, which takes them over. */
  readonly renamed: ReadableAtom<WriteUp | null>;
  /** The write-up each time that another's changes came into it, which the editor takes over. */
  readonly merged: ReadableAtom<WriteUp | null>;
  /** Where photos go. */
  readonly uploads: { readonly projectId: string };
  /** After every change of the document, never for a change of the figures. */
  readonly onChange: (writeUp: WriteUp) => void;
  /** The measure that the selected live measure shows; null when another thing is selected. */
  readonly onSelectMeasure: (name: string | null) => void;
}

type Opened =
  | {
      readonly type: 'measure';
      readonly from: number;
      readonly to: number;
      readonly begin: LiveText;
      readonly changing: boolean;
    }
  | { readonly type: 'piece' }
  | { readonly type: 'link'; readonly href: string };

/** The write-up's editor: text, steps, live measures, pieces and photos, all by keyboard. */
export function WriteUpEditor({
  initial,
  figures,
  lit,
  renamed,
  merged,
  uploads,
  onChange,
  onSelectMeasure,
}: WriteUpEditorProps) {
  const frame = useRef<HTMLDivElement>(null);
  const chooser = useRef<HTMLInputElement>(null);
  const [opened, setOpened] = useState<Opened | null>(null);
  const [said, setSaid] = useState('');
  const [unreadable, setUnreadable] = useState(false);
  const told = useRef({ onChange, onSelectMeasure });
  useEffect(() => {
    told.current = { onChange, onSelectMeasure };
  });

  const editing = useRef<Editor | null>(null);
  const [{ desk, send }] = useState(() => {
    const ask = (range: { from: number; to: number }) => {
      const { current: editor } = editing;
      if (!editor) return;
      const text = editor.state.doc.textBetween(range.from, range.to, ' ');
      const formula = /^:*$/.test(text) || text.length > 60 ? '' : text;
      setOpened({ type: 'measure', ...range, begin: { formula, bare: false }, changing: false });
    };
    const change = (pos: number) => {
      const node = editing.current?.state.doc.nodeAt(pos);
      if (node?.type.name === 'measure')
        setOpened({ type: 'measure', from: pos, to: pos + 1, begin: node.attrs as LiveText, changing: true });
    };
    const shared: EditingDesk = { figures, lit, askMeasure: ask, changeMeasure: change, say: setSaid };
    return { desk: shared, send: pictureSender(uploads.projectId) };
  });

  const editor = useEditor({
    extensions: editorExtensions(desk, send),
    content: initial.doc as unknown as Record<string, unknown>,
    immediatelyRender: false,
    injectCSS: false,
    enableContentCheck: true,
    onContentError: ({ editor: broken }) => {
      broken.setEditable(false, false);
      setUnreadable(true);
    },
    editorProps: {
      attributes: {
        class: 'article writeup-text',
        role: 'textbox',
        'aria-multiline': 'true',
        'aria-label': 'Write-up',
        spellcheck: 'true',
      },
      transformPastedHTML: (html) => plainPastedHtml(html, figures.get()),
    },
    onCreate: ({ editor: made }) => {
      editing.current = made;
    },
    onUpdate: ({ editor: changed }) => {
      if (changed.isEditable)
        told.current.onChange({ version: WRITE_UP_VERSION, doc: storedForm(changed.getJSON() as DocNode) });
    },
    onSelectionUpdate: ({ editor: { state } }) => {
      const { selection } = state;
      const formula =
        selection instanceof NodeSelection && selection.node.type.name === 'measure'
          ? String(selection.node.attrs.formula)
          : null;
      told.current.onSelectMeasure(formula === null ? null : (usesOf(desk, formula)[0] ?? null));
    },
    // What is asked for keeps its place while the text round it changes, as when a photo arrives.
    onTransaction: ({ transaction }) => {
      if (!transaction.docChanged) return;
      setOpened((now) =>
        now?.type === 'measure'
          ? { ...now, from: transaction.mapping.map(now.from, -1), to: transaction.mapping.map(now.to, 1) }
          : now,
      );
    },
  });

  useEffect(
    () => renamed.listen((writeUp) => writeUp && editing.current && takeNames(editing.current, writeUp.doc)),
    [renamed],
  );
  useEffect(
    () => merged.listen((writeUp) => writeUp && editing.current && takeDocument(editing.current, writeUp.doc)),
    [merged],
  );

  const followed = useEditorState({ editor, selector: ({ editor: now }) => (now ? toolState(now) : null) });
  // Nothing has happened in a new editor yet that would have told the hook.
  const state = followed ?? (editor ? toolState(editor) : null);
  const live = useStore(figures);
  const openLink = () => editor && setOpened({ type: 'link', href: linkAt(editor) });
  const openPiece = () => setOpened({ type: 'piece' });
  const choosePhoto = () => chooser.current?.click();

  const close = () => {
    setOpened(null);
    editor?.commands.focus(undefined, { scrollIntoView: false });
  };
  const anchor = () => {
    const at = opened?.type === 'measure' ? opened.from : (editor?.state.selection.from ?? 0);
    return editor?.view.coordsAtPos(at) ?? { left: 0, bottom: 0 };
  };

  return (
    <div
      ref={frame}
      className="writeup-editor"
      onKeyDown={(event) => {
        const act = editor && shortcut(event, editor, { openLink, openPiece, choosePhoto });
        if (!act) return;
        event.preventDefault();
        // The desk has keys of its own, some of them with the same letter.
        event.stopPropagation();
        act();
      }}
    >
      {editor && state ? (
        <div className="writeup-bar">
          <Toolbar label="Put in" words tools={partTools(editor, { desk, openPiece, choosePhoto })} />
          <Toolbar label="Text" words={false} tools={markTools(editor, state, { openLink })} />
        </div>
      ) : null}
      {unreadable ? (
        <p className="problem" role="alert">
          <b>This write-up does not read here.</b> It stays as it is and cannot be changed, so that nothing of it is
          lost. Reload the page: it may be older than the site.
        </p>
      ) : null}
      <EditorContent editor={editor} className="writeup-page" />
      <input
        ref={chooser}
        type="file"
        hidden
        multiple
        accept="image/jpeg,image/png,image/webp"
        aria-label="Photos to put in"
        onChange={(event) => {
          const files = [...(event.target.files ?? [])];
          event.target.value = '';
          if (editor) {
            uploadPhotos(editor, files, { send, say: desk.say });
            editor.commands.focus();
          }
        }}
      />
      {editor && opened ? (
        <Popover
          key={opened.type}
          label={opened.type === 'measure' ? 'Live measure' : opened.type === 'piece' ? 'Pieces' : 'Link'}
          anchor={anchor}
          within={frame}
          onClose={close}
        >
          {opened.type === 'measure' ? (
            <MeasureField
              live={live}
              begin={opened.begin}
              changing={opened.changing}
              onTake={(text) => {
                putMeasure(editor, opened, text);
                close();
              }}
            />
          ) : opened.type === 'piece' ? (
            <PieceList
              figures={live?.figures ?? null}
              shown={new Set(collectUses(editor.getJSON() as unknown as DocNode).pieces.map(({ piece }) => piece))}
              onTake={(piece) => {
                setOpened(null);
                insertPart(editor, 'pieceCard', { piece });
              }}
            />
          ) : (
            <LinkField
              href={opened.href}
              onTake={(href) => {
                setLink(editor, href);
                close();
              }}
              onRemove={() => {
                setLink(editor, null);
                close();
              }}
            />
          )}
        </Popover>
      ) : null}
      <p className="visually-hidden" aria-live="polite">
        {said}
      </p>
    </div>
  );
}
