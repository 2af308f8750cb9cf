import { useStore } from '@nanostores/react';
import type { Editor } from '@tiptap/core';
import { NodeSelection } from '@tiptap/pm/state';
import { EditorContent, useEditor, useEditorState } from '@tiptap/react';
import type { ReadableAtom } from 'nanostores';
import { useEffect, useRef, useState } from 'react';
import { WRITE_UP_VERSION, type DocNode, type StepNode, type WriteUp } from '../document';
import type { FiguresStore } from '../figures-store';
import { usesOf } from '../nodes/measure/view';
import { storedForm } from '../stored-form';
import type { EditingDesk } from './editing-desk';
import { editorExtensions } from './extensions';
import {
  changeMeasure,
  movedBy,
  openCondition,
  openLink,
  openMeasure,
  openStep,
  openStray,
  OPENED_LABELS,
  type Opened,
} from './opened';
import { FindBar } from './FindBar';
import { OpenedField } from './OpenedField';
import { insertSteps } from './insert-steps';
import { plainPastedHtml } from './pasted-html';
import { uploadPhotos } from './photo-uploads';
import { Popover } from './Popover';
import { pictureSender } from './send-picture';
import { markTools, partTools, toolState, type Opens } from './tools';
import { shortcut } from './shortcuts';
import { Toolbar } from './Toolbar';
import { stepAt } from './steps';
import { stepNumbers } from './step-numbers';
import { createTeller } from './teller';
import { takeDocument, toldNow, type Told } from './take-document';
import { tableTools } from './table-keys';
import { WriteUpFoot } from './WriteUpFoot';
import { takeNames } from './writing';

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
  /** Steps each time that some were brought in, which go behind the last part or in place of an empty write-up. */
  readonly incoming: ReadableAtom<readonly StepNode[] | null>;
  /** Where photos go. */
  readonly uploads: { readonly projectId: string };
  /** After changes of the document, in the pause behind them and before the focus leaves; never for a change of the figures. */
  readonly onChange: (writeUp: WriteUp) => void;
  /** The measure that the selected live measure shows; null when another thing is selected. */
  readonly onSelectMeasure: (name: string | null) => void;
}

/** The write-up's editor: text, steps, live measures, pieces and photos, all by keyboard. */
export function WriteUpEditor({
  initial,
  figures,
  lit,
  renamed,
  merged,
  incoming,
  uploads,
  onChange,
  onSelectMeasure,
}: WriteUpEditorProps) {
  const frame = useRef<HTMLDivElement>(null);
  const chooser = useRef<HTMLInputElement>(null);
  const [opened, setOpened] = useState<Opened | null>(null);
  const [said, setSaid] = useState('');
  /** What is sought when the bar for it opens; null while it is closed. */
  const [sought, setSought] = useState<string | null>(null);
  const [unreadable, setUnreadable] = useState(false);
  const told = useRef({ onChange, onSelectMeasure });
  useEffect(() => {
    told.current = { onChange, onSelectMeasure };
  });

  const editing = useRef<Editor | null>(null);
  const known = useRef<Told | null>(null);
  const [{ desk, send, extensions, teller }] = useState(() => {
    const open = (find: (editor: Editor) => Opened | null) => {
      if (editing.current) setOpened(find(editing.current));
    };
    const { numbers, extension } = stepNumbers(figures);
    const shared: EditingDesk = {
      figures,
      lit,
      numbers,
      askMeasure: (range) => open((now) => openStray(now, figures.get()) ?? openMeasure(now, range)),
      changeMeasure: (pos) => open((now) => changeMeasure(now, pos)),
      askStep: (pos, what) => open((now) => openStep(now, pos, what)),
      say: setSaid,
    };
    const tell = () => {
      const { current: changed } = editing;
      if (!changed?.isEditable) return;
      known.current = toldNow(changed);
      told.current.onChange({ version: WRITE_UP_VERSION, doc: storedForm(changed.getJSON() as DocNode) });
    };
    const send = pictureSender(uploads.projectId);
    return { desk: shared, send, extensions: editorExtensions(shared, send, [extension]), teller: createTeller(tell) };
  });

  const editor = useEditor({
    extensions,
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
      known.current = toldNow(made);
    },
    onUpdate: () => teller.changed(),
    onBlur: () => teller.flush(),
    onSelectionUpdate: ({ editor: { state } }) => {
      const { selection } = state;
      const formula =
        selection instanceof NodeSelection && selection.node.type.name === 'measure'
          ? String(selection.node.attrs.formula)
          : null;
      told.current.onSelectMeasure(formula === null ? null : (usesOf(desk, formula)[0] ?? null));
    },
    onTransaction: ({ transaction }) => {
      if (!transaction.docChanged) return;
      known.current?.since.appendMapping(transaction.mapping);
      setOpened((now) => movedBy(now, transaction.mapping));
    },
  });

  // What is told late must not be lost with the page, nor taken for what it was by a rename or a merge.
  useEffect(() => {
    const events = ['pagehide', 'visibilitychange', 'blur'] as const;
    for (const event of events) window.addEventListener(event, teller.flush, true);
    return () => {
      for (const event of events) window.removeEventListener(event, teller.flush, true);
      teller.stop();
    };
  }, [teller]);
  useEffect(
    () => renamed.listen((writeUp) => writeUp && editing.current && takeNames(editing.current, writeUp.doc)),
    [renamed],
  );
  useEffect(
    () => incoming.listen((steps) => steps && editing.current && insertSteps(editing.current, steps)),
    [incoming],
  );
  useEffect(
    () =>
      merged.listen((writeUp) => {
        if (!writeUp || !editing.current) return;
        takeDocument(editing.current, writeUp.doc, known.current ?? undefined);
        teller.flush();
      }),
    [merged, teller],
  );

  const followed = useEditorState({ editor, selector: ({ editor: now }) => (now ? toolState(now) : null) });
  // Nothing has happened in a new editor yet that would have told the hook.
  const state = followed ?? (editor ? toolState(editor) : null);
  const inTable = useEditorState({ editor, selector: ({ editor: now }) => now?.isActive('table') ?? false });
  const live = useStore(figures);
  const opens: Opens = {
    link: () => editor && setOpened(openLink(editor)),
    list: (type) => setOpened({ type }),
    condition: () => {
      const found = editor && openCondition(editor);
      if (found) setOpened(found);
      else setSaid('Select the words that depend on something, or stand in a step.');
    },
    moment: () => {
      const pos = editor ? stepAt(editor) : null;
      if (editor && pos !== null) setOpened(openStep(editor, pos, 'moment'));
      else setSaid('Stand in the step that the video shows.');
    },
    photo: () => chooser.current?.click(),
    find: () => {
      if (!editor) return;
      const { from, to } = editor.state.selection;
      const words = editor.state.doc.textBetween(from, to, ' ');
      setSought(words.length > 0 && words.length <= 80 ? words : '');
    },
  };

  const close = () => {
    setOpened(null);
    editor?.commands.focus(undefined, { scrollIntoView: false });
  };
  const anchor = () => {
    if (!editor) return { left: 0, bottom: 0 };
    if (opened?.type === 'when' || opened?.type === 'moment') {
      const dom = editor.view.nodeDOM(opened.from);
      const head = dom instanceof HTMLElement ? dom.querySelector('.step-head') : null;
      if (head) return head.getBoundingClientRect();
    }
    return editor.view.coordsAtPos(opened && 'from' in opened ? opened.from : editor.state.selection.from);
  };

  return (
    <div
      ref={frame}
      className="writeup-editor"
      onKeyDown={(event) => {
        const act = editor && shortcut(event, editor, opens);
        if (!act) return;
        event.preventDefault();
        // The desk has keys of its own, some of them with the same letter.
        event.stopPropagation();
        act();
      }}
    >
      {editor && state ? (
        <div className="writeup-bar">
          <Toolbar label="Put in" words tools={partTools(editor, desk, opens)} />
          <Toolbar label="Text" words={false} tools={markTools(editor, state, opens)} />
          {sought === null ? null : <FindBar editor={editor} begin={sought} onClose={() => setSought(null)} />}
          {inTable ? <Toolbar label="Table" words={false} tools={tableTools(editor)} /> : null}
        </div>
      ) : null}
      {unreadable ? (
        <p className="problem" role="alert">
          <b>This write-up does not read here.</b> It stays as it is and cannot be changed, so that nothing of it is
          lost. Reload the page: it may be older than the site.
        </p>
      ) : null}
      <EditorContent editor={editor} className="writeup-page" />
      {editor ? <WriteUpFoot editor={editor} onOutline={() => opens.list('outline')} onFind={opens.find} /> : null}
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
        <Popover key={opened.type} label={OPENED_LABELS[opened.type]} anchor={anchor} within={frame} onClose={close}>
          <OpenedField
            editor={editor}
            opened={opened}
            live={live}
            close={close}
            leave={() => setOpened(null)}
            reopen={setOpened}
          />
        </Popover>
      ) : null}
      <p className="visually-hidden" aria-live="polite">
        {said}
      </p>
    </div>
  );
}
