import { Node } from '@tiptap/core';
import { isMoment, readJson, textUpTo, videoMoment } from '../attributes';

/** A numbered step; the number follows from its place. */
export const Step = Node.create({
  name: 'step',
  group: 'part',
  content: 'block+',
  isolating: true,
  defining: true,

  addAttributes() {
    return {
      title: {
        default: '',
        validate: textUpTo(200),
        parseHTML: (element) => element.getAttribute('data-title') ?? '',
        renderHTML: ({ title }) => ({ 'data-title': String(title) }),
      },
      mark: {
        default: '',
        validate: textUpTo(60),
        parseHTML: (element) => element.getAttribute('data-mark') ?? '',
        renderHTML: ({ mark }) => ({ 'data-mark': String(mark) }),
      },
      moment: {
        default: null,
        validate: videoMoment,
        parseHTML: (element) => readJson(element.getAttribute('data-moment'), isMoment),
        renderHTML: ({ moment }) => (moment === null ? {} : { 'data-moment': JSON.stringify(moment) }),
      },
    };
  },

  parseHTML() {
    return [{ tag: 'section[data-title]' }];
  },

  renderHTML({ HTMLAttributes }) {
    return ['section', HTMLAttributes, 0];
  },
});
