import { Mark } from '@tiptap/core';
import { CONDITION_LENGTH, textUpTo } from '../../nodes/attributes';

/** A phrase that is said only when a condition holds. Outermost of the marks, so that one phrase is one element. */
export const OnlyWhen = Mark.create({
  name: 'onlyWhen',
  priority: 1100,
  inclusive: false,
  exitable: true,

  addAttributes() {
    return {
      when: {
        default: '',
        validate: textUpTo(CONDITION_LENGTH),
        parseHTML: (element) => element.getAttribute('data-when') ?? '',
        renderHTML: ({ when }) => ({ 'data-when': String(when) }),
      },
    };
  },

  parseHTML() {
    return [{ tag: 'span[data-when]' }];
  },

  renderHTML({ HTMLAttributes }) {
    return ['span', { class: 'only-when', ...HTMLAttributes }, 0];
  },
});
