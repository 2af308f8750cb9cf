import type { NodeViewRenderer } from '@tiptap/core';
import { textField } from '../../editor/dom';
import { typeAttribute } from '../../editor/type-attribute';
import { pictureSources, pictureUrl } from '../../pictures';

/** A photo in the editor: the picture, the words for those who cannot see it, and the caption, which is ordinary text. */
export function photoView(): NodeViewRenderer {
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
    side.append(contentDOM, label);
    dom.append(image, side);

    let current = node;
    const show = () => {
      const {
        upload,
        width,
        height,
        alt: words,
      } = current.attrs as { upload: string; width: number; height: number; alt: string };
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
      stopEvent: (event) => event.target instanceof Node && label.contains(event.target),
      ignoreMutation: (mutation) => mutation.type !== 'selection' && !contentDOM.contains(mutation.target),
    };
  };
}
