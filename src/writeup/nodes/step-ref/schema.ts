import { mergeAttributes, Node } from '@tiptap/core';
import { stepKey } from '../attributes';

/** The number of another step, counted wherever the text is shown. */
export const StepRef = Node.create({
  name: 'stepRef',
  group: 'inline',
  inline: true,
  atom: true,
  selectable: true,

  addAttributes() {
    return {
      key: {
        default: '',
        validate: stepKey,
        parseHTML: (element) => element.getAttribute('data-step-ref') ?? '',
        renderHTML: ({ key }) => ({ 'data-step-ref': String(key) }),
      },
    };
  },

  parseHTML() {
    return [{ tag: 'a[data-step-ref]', priority: 1200 }, { tag: 'span[data-step-ref]' }];
  },

  renderHTML({ HTMLAttributes }) {
    return ['span', mergeAttributes({ class: 'step-ref' }, HTMLAttributes), 'step'];
  },

  renderText() {
    return 'step';
  },
});
