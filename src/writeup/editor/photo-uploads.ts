import { Extension, type Editor } from '@tiptap/core';
import { closeHistory } from '@tiptap/pm/history';
import { Plugin, PluginKey } from '@tiptap/pm/state';
import { Decoration, DecorationSet, type EditorView } from '@tiptap/pm/view';
import { placeForBlock } from './insert-block';
import type { SendPicture } from './send-picture';

const uploads = new PluginKey<DecorationSet>('photoUploads');
type Change = { readonly add: { id: string; pos: number; dom: HTMLElement } } | { readonly remove: string };

const PICTURE = /^image\//;
const picturesOf = (data: DataTransfer | null): File[] =>
  [...(data?.files ?? [])].filter(({ type, name }) => PICTURE.test(type) || /\.(jpe?g|png|webp|heic)$/i.test(name));

export interface PhotoUploadsOptions {
  readonly send: SendPicture;
  readonly say: (sentence: string) => void;
}

/**
 * Photos that are dropped, pasted or chosen. While one is on its way a placeholder stands in the text: it is drawn, not
 * stored, moves with what is typed round it, and gives way to the photo as one step of undo.
 */
export const photoUploads = ({ send, say }: PhotoUploadsOptions) =>
  Extension.create({
    name: 'photoUploads',

    addProseMirrorPlugins() {
      const { editor } = this;
      return [
        new Plugin<DecorationSet>({
          key: uploads,
          state: {
            init: () => DecorationSet.empty,
            apply(tr, set) {
              const mapped = set.map(tr.mapping, tr.doc);
              const change = tr.getMeta(uploads) as Change | undefined;
              if (!change) return mapped;
              if ('remove' in change)
                return mapped.remove(mapped.find(undefined, undefined, (spec) => spec.id === change.remove));
              const { id, pos, dom } = change.add;
              // Side 1: a photo that arrives at the same place goes in front, so that several keep their order.
              return mapped.add(tr.doc, [
                Decoration.widget(pos, dom, { id, key: id, side: 1, stopEvent: () => true, ignoreSelection: true }),
              ]);
            },
          },
          props: {
            decorations: (state) => uploads.getState(state),
            handlePaste(view, event) {
              const files = picturesOf(event.clipboardData);
              // A word processor puts a picture of the text beside the text: the text is meant.
              if (
                files.length === 0 ||
                event.clipboardData
                  ?.getData('text/html')
                  .replace(/<[^>]*>/g, '')
                  .trim()
              )
                return false;
              uploadPhotos(editor, files, { send, say });
              return true;
            },
            handleDrop(view, event, _slice, moved) {
              const files = moved ? [] : picturesOf(event.dataTransfer);
              if (files.length === 0) return false;
              event.preventDefault();
              const at = view.posAtCoords({ left: event.clientX, top: event.clientY });
              uploadPhotos(editor, files, { send, say }, at?.pos);
              return true;
            },
          },
        }),
      ];
    },
  });

/** Sends files and puts a photo where the caret, or `at`, was when it began. */
export function uploadPhotos(
  editor: Editor,
  files: readonly File[],
  { send, say }: PhotoUploadsOptions,
  at?: number,
): void {
  const { photo, paragraph } = editor.schema.nodes;
  if (!photo || !paragraph) return;
  for (const file of files) {
    const { doc, selection } = editor.state;
    const place = placeForBlock(
      at === undefined ? selection.$to : doc.resolve(at),
      photo.create({ upload: 'pending' }),
    );
    if (!place) {
      say('A photo cannot stand here.');
      continue;
    }
    // In front of an empty paragraph, so that the caret stays where one may type on.
    begin(editor, file, place.from, { send, say });
  }
}

let counted = 0;

function begin(editor: Editor, file: File, pos: number, { send, say }: PhotoUploadsOptions): void {
  const id = `photo-${(counted += 1)}`;
  const placeholder = makePlaceholder(file.name || 'Photo');
  const change = (view: EditorView, what: Change) =>
    view.dispatch(view.state.tr.setMeta(uploads, what).setMeta('addToHistory', false));
  const drop = () => {
    if (!editor.isDestroyed) change(editor.view, { remove: id });
  };
  const place = () => uploads.getState(editor.state)?.find(undefined, undefined, (spec) => spec.id === id)[0]?.from;

  const attempt = async () => {
    const stop = new AbortController();
    placeholder.working(() => {
      stop.abort();
      drop();
      say('Photo left out.');
    });
    const sent = await send(file, { onProgress: placeholder.progress, signal: stop.signal });
    if (editor.isDestroyed || place() === undefined) return;
    if (!sent.ok) {
      if (sent.sentence === '') return drop();
      placeholder.failed(sent.sentence, () => void attempt(), drop);
      say(sent.sentence);
      return;
    }
    const { id: upload, width, height } = sent.picture;
    const at = place();
    const node = editor.schema.nodes.photo?.create({ upload, width, height, alt: '' });
    if (at === undefined || !node) return;
    const tr = editor.state.tr.setMeta(uploads, { remove: id } satisfies Change);
    editor.view.dispatch(closeHistory(tr).insert(at, node));
    say('Photo placed. Say in words what it shows.');
  };

  change(editor.view, { add: { id, pos, dom: placeholder.dom } });
  void attempt();
}

function makePlaceholder(name: string) {
  const dom = document.createElement('div');
  dom.className = 'photo-coming';
  dom.contentEditable = 'false';
  const words = document.createElement('p');
  const bar = document.createElement('progress');
  bar.max = 1;
  const actions = document.createElement('div');
  actions.className = 'photo-coming-actions';
  dom.append(words, bar, actions);
  const button = (label: string, act: () => void) => {
    const made = document.createElement('button');
    made.type = 'button';
    made.className = 'btn small-btn';
    made.textContent = label;
    made.addEventListener('click', act);
    return made;
  };
  return {
    dom,
    working(stop: () => void) {
      dom.classList.remove('failed');
      words.textContent = `Sending ${name}`;
      bar.hidden = false;
      bar.value = 0;
      bar.setAttribute('aria-label', `Sending ${name}`);
      actions.replaceChildren(button('Stop', stop));
    },
    progress(part: number) {
      // Sent in full, but not yet encoded: an unfinished bar of unknown length.
      if (part < 1) bar.value = part;
      else {
        bar.removeAttribute('value');
        words.textContent = `Making sizes of ${name}`;
      }
    },
    failed(sentence: string, again: () => void, leave: () => void) {
      dom.classList.add('failed');
      bar.hidden = true;
      words.textContent = sentence;
      actions.replaceChildren(button('Try again', again), button('Leave it out', leave));
    },
  };
}
