import { Node } from '@tiptap/core';
import { CONDITION_LENGTH, isMoment, readJson, stepKey, textUpTo, videoMoment, yesNo } from '../attributes';

/** A numbered step; the number follows from its place. */
export const Step = Node.create({
  name: 'step',
  group: 'part',
  content: 'block+',
  isolating: true,
  draggable: true,
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
      when: {
        default: '',
        validate: textUpTo(CONDITION_LENGTH),
        parseHTML: (element) => element.getAttribute('data-when') ?? '',
        renderHTML: ({ when }) => (when === '' ? {} : { 'data-when': String(when) }),
      },
      optional: {
        default: false,
        validate: yesNo,
        parseHTML: (element) => element.hasAttribute('data-optional'),
        renderHTML: ({ optional }) => (optional ? { 'data-optional': '' } : {}),
      },
      key: {
        default: '',
        validate: stepKey,
        parseHTML: (element) => element.getAttribute('data-key') ?? '',
        renderHTML: ({ key }) => (key === '' ? {} : { 'data-key': String(key) }),
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
