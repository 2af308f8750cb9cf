import { Node } from '@tiptap/core';
import { isCrop, isFocus, photoCrop, photoFocus, pixels, readJson, textUpTo, uploadId } from '../attributes';

/** A stored picture with its text alternative; the content is the caption. */
export const Photo = Node.create({
  name: 'photo',
  group: 'block',
  content: 'inline*',
  isolating: true,
  draggable: true,

  addAttributes() {
    return {
      upload: {
        default: '',
        validate: uploadId,
        parseHTML: (element) => element.getAttribute('data-upload') ?? '',
        renderHTML: ({ upload }) => ({ 'data-upload': String(upload) }),
      },
      alt: {
        default: '',
        validate: textUpTo(500),
        parseHTML: (element) => element.getAttribute('data-alt') ?? '',
        renderHTML: ({ alt }) => ({ 'data-alt': String(alt) }),
      },
      width: {
        default: 1,
        validate: pixels,
        parseHTML: (element) => Number(element.getAttribute('data-width')) || 1,
        renderHTML: ({ width }) => ({ 'data-width': String(width) }),
      },
      height: {
        default: 1,
        validate: pixels,
        parseHTML: (element) => Number(element.getAttribute('data-height')) || 1,
        renderHTML: ({ height }) => ({ 'data-height': String(height) }),
      },
      focus: {
        default: null,
        validate: photoFocus,
        parseHTML: (element) => readJson(element.getAttribute('data-focus'), isFocus),
        renderHTML: ({ focus }) => (focus === null ? {} : { 'data-focus': JSON.stringify(focus) }),
      },
      crop: {
        default: 'whole',
        validate: photoCrop,
        parseHTML: (element) => {
          const crop = element.getAttribute('data-crop');
          return isCrop(crop) ? crop : 'whole';
        },
        renderHTML: ({ crop }) => (crop === 'whole' ? {} : { 'data-crop': String(crop) }),
      },
    };
  },

  parseHTML() {
    return [{ tag: 'figure[data-upload]', contentElement: 'figcaption' }];
  },

  renderHTML({ HTMLAttributes }) {
    return ['figure', HTMLAttributes, ['figcaption', {}, 0]];
  },
});
