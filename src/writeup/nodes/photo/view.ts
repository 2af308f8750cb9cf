import type { NodeViewRenderer } from '@tiptap/core';
import type { PhotoCrop, PhotoNode } from '../../document';
import { iconButton, textField } from '../../editor/dom';
import type { EditingDesk } from '../../editor/editing-desk';
import { movePart } from '../../editor/steps';
import { typeAttribute } from '../../editor/type-attribute';
import { focusClasses, pictureSources, pictureUrl } from '../../pictures';

const MIDDLE = { across: 5, down: 5 } as const;
const CROPS: readonly (readonly [PhotoCrop, string])[] = [
  ['whole', 'Whole picture'],
  ['wide', 'Cropped wide'],
  ['square', 'Cropped square'],
];

/** A photo in the editor: the picture, what of it stays in sight when it is cropped, the words for those who cannot see it, and the caption, which is ordinary text. */
export function photoView(desk: EditingDesk): NodeViewRenderer {
  return ({ node, editor, getPos }) => {
    const dom = document.createElement('figure');
    dom.className = 'photo photo-edited';
    const image = document.createElement('img');
    image.draggable = false;
    const side = document.createElement('div');
    side.className = 'photo-words';
    const label = document.createElement('label');
    label.className = 'photo-alt';
    label.contentEditable = 'false';
    const labelWords = document.createElement('span');
    const alt = textField({
      className: 'input',
      label: 'What the photo shows, in words',
      placeholder: 'For those who cannot see it',
      maxLength: 500,
    });
    label.append(labelWords, alt);
    const contentDOM = document.createElement('figcaption');
    contentDOM.dataset.hint = 'Caption';
    const frame = document.createElement('div');
    frame.className = 'photo-frame';
    frame.contentEditable = 'false';
    const focus = document.createElement('button');
    focus.type = 'button';
    focus.className = 'photo-focus';
    frame.append(image, focus);
    const tools = document.createElement('div');
    tools.className = 'photo-tools';
    tools.contentEditable = 'false';
    const crop = document.createElement('select');
    crop.setAttribute('aria-label', 'Crop');
    crop.append(...CROPS.map(([value, words]) => new Option(words, value)));
    const move = (by: -1 | 1, refused: string) => () => {
      const pos = getPos();
      if (pos !== undefined && !movePart(editor, pos, by)) desk.say(refused);
    };
    tools.append(
      crop,
      iconButton('chevron-up', 'Move the photo up', move(-1, 'This is the first place.')),
      iconButton('chevron-down', 'Move the photo down', move(1, 'This is the last place.')),
    );
    side.append(contentDOM, label, tools);
    dom.append(frame, side);

    let current = node;
    const show = () => {
      const {
        upload,
        width,
        height,
        alt: words,
        crop: cropped = 'whole',
        focus: at,
      } = current.attrs as PhotoNode['attrs'];
      const { across, down } = at ?? MIDDLE;
      crop.value = cropped;
      focus.className = `photo-focus${focusClasses({ across, down })}`;
      focus.setAttribute(
        'aria-label',
        `What stays in sight: ${across * 10} % across, ${down * 10} % down. Arrows move it; a click on the picture sets it.`,
      );
      const src = pictureUrl(upload, 960);
      if (image.getAttribute('src') !== src) {
        image.srcset = pictureSources(upload, width);
        image.sizes = '320px';
        image.src = src;
      }
      image.width = width;
      image.height = height;
      image.alt = words;
      if (alt.value !== words) alt.value = words;
      label.classList.toggle('missing', words.trim() === '');
      labelWords.textContent = words.trim() === '' ? 'Say what it shows' : 'It shows';
      contentDOM.classList.toggle('empty-hint', current.content.size === 0);
    };
    show();
    const aim = (across: number, down: number) => {
      const pos = getPos();
      const within = (n: number) => Math.min(10, Math.max(0, Math.round(n)));
      if (pos !== undefined) typeAttribute(editor, pos, 'focus', { across: within(across), down: within(down) });
    };
    image.addEventListener('click', (event) => {
      const box = image.getBoundingClientRect();
      aim(((event.clientX - box.left) / box.width) * 10, ((event.clientY - box.top) / box.height) * 10);
    });
    focus.addEventListener('keydown', (event) => {
      const by = { ArrowLeft: [-1, 0], ArrowRight: [1, 0], ArrowUp: [0, -1], ArrowDown: [0, 1] }[event.key];
      if (!by) return;
      event.preventDefault();
      const { across, down } = (current.attrs as PhotoNode['attrs']).focus ?? MIDDLE;
      aim(across + (by[0] ?? 0), down + (by[1] ?? 0));
    });
    crop.addEventListener('change', () => {
      const pos = getPos();
      if (pos !== undefined) typeAttribute(editor, pos, 'crop', crop.value);
    });
    alt.addEventListener('input', () => {
      const pos = getPos();
      if (pos !== undefined) typeAttribute(editor, pos, 'alt', alt.value);
    });
    alt.addEventListener('keydown', (event) => {
      const held = event.ctrlKey || event.metaKey;
      if (held && event.key.toLowerCase() === 'z') {
        event.preventDefault();
        if (event.shiftKey) editor.commands.redo();
        else editor.commands.undo();
      }
      if ((event.key === 'Enter' || event.key === 'Escape') && !event.isComposing) {
        event.preventDefault();
        const pos = getPos();
        if (pos !== undefined) editor.commands.focus(pos + 1 + current.content.size);
      }
    });

    return {
      dom,
      contentDOM,
      update(next) {
        if (next.type !== current.type) return false;
        current = next;
        show();
        return true;
      },
      selectNode: () => dom.classList.add('selected'),
      deselectNode: () => dom.classList.remove('selected'),
      stopEvent: (event) =>
        event.target instanceof Node && [label, tools, focus].some((part) => part.contains(event.target as Node)),
      ignoreMutation: (mutation) => mutation.type !== 'selection' && !contentDOM.contains(mutation.target),
    };
  };
}
