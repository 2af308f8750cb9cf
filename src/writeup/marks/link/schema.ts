import { Mark } from '@tiptap/core';
import { safeHref } from '../../links';

/** A link to http, https, mailto or a place on this site; nothing else is ever stored. */
export const Link = Mark.create({
  name: 'link',
  priority: 1000,
  inclusive: false,
  exitable: true,

  addAttributes() {
    return {
      href: {
        default: '',
        validate: (value: unknown) => {
          if (typeof value !== 'string' || safeHref(value) === null) {
            throw new RangeError('a link goes to an http, https or mailto address, or to a place on this site');
          }
        },
      },
    };
  },

  parseHTML() {
    return [
      {
        tag: 'a[href]',
        getAttrs: (element) => {
          const href = safeHref(element.getAttribute('href') ?? '');
          return href === null ? false : { href };
        },
      },
    ];
  },

  renderHTML({ HTMLAttributes }) {
    return ['a', { href: String(HTMLAttributes.href), rel: 'noopener' }, 0];
  },
});
