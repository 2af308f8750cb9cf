import type { Editor, NodeViewRenderer } from '@tiptap/core';
import { TextSelection } from '@tiptap/pm/state';
import { movePart, removePart } from '../../editor/steps';
import type { EditingDesk } from '../../editor/editing-desk';
import type { IconName } from '@/components/icons';
import { holds } from '../../condition';
import type { VideoMoment } from '../../document';
import { iconButton, iconSvg, textField } from '../../editor/dom';
import { typeAttribute } from '../../editor/type-attribute';
import { momentText } from '../../video-moment';

/** A step in the editor: its number from the style sheet's counter, fields for title and mark, then its text. */
export function stepView(desk: EditingDesk): NodeViewRenderer {
  return ({ node, editor, getPos }) => {
    const dom = document.createElement('section');
    dom.className = 'step step-edited';
    const number = document.createElement('div');
    number.className = 'step-number';
    number.contentEditable = 'false';
    number.setAttribute('aria-hidden', 'true');
    // Steps are dragged by their number; the step itself is what ProseMirror then takes along.
    number.draggable = true;
    number.title = 'Drag to move the step';
    const body = document.createElement('div');
    body.className = 'step-body';
    const head = document.createElement('div');
    head.className = 'step-head';
    head.contentEditable = 'false';
    const contentDOM = document.createElement('div');
    contentDOM.className = 'step-content';

    const title = textField({
      className: 'step-title-field',
      label: 'Title of the step',
      placeholder: 'Title of this step',
      maxLength: 200,
    });
    const mark = textField({
      className: 'step-mark-field',
      label: 'Mark beside the title',
      placeholder: 'mark',
      maxLength: 60,
    });
    const act = (work: (pos: number) => void) => () => {
      const pos = getPos();
      if (pos !== undefined) work(pos);
    };
    const facts = document.createElement('div');
    facts.className = 'step-facts';
    const whenChip = chip('fork', () => act((pos) => desk.askStep(pos, 'when'))());
    const optionalChip = chip('fork', () => act((pos) => desk.askStep(pos, 'when'))());
    const momentChip = chip('play', () => act((pos) => desk.askStep(pos, 'moment'))());
    facts.append(whenChip.dom, optionalChip.dom, momentChip.dom);
    const tools = document.createElement('div');
    tools.className = 'step-tools';
    tools.append(
      iconButton(
        'chevron-up',
        'Move the step up',
        act((pos) => movePart(editor, pos, -1) || desk.say('This is the first place.')),
      ),
      iconButton(
        'chevron-down',
        'Move the step down',
        act((pos) => movePart(editor, pos, 1) || desk.say('This is the last place.')),
      ),
      iconButton(
        'trash',
        'Remove the step',
        act((pos) => {
          removePart(editor, pos);
          desk.say('Step removed. Undo brings it back.');
        }),
      ),
    );
    head.append(title, mark, tools);
    facts.contentEditable = 'false';
    body.append(facts, head, contentDOM);
    dom.append(number, body);

    let current = node;
    const show = () => {
      for (const [field, value] of [
        [title, current.attrs.title],
        [mark, current.attrs.mark],
      ] as const) {
        if (field.value !== value) field.value = String(value);
      }
      // A field that is as wide as its words, so that the mark stands right behind the title.
      mark.size = Math.max(6, String(current.attrs.mark).length + 1);
      const { when, optional, moment } = current.attrs as {
        when: string;
        optional: boolean;
        moment: VideoMoment | null;
      };
      whenChip.show(when === '' ? '' : `only when ${when}`);
      optionalChip.show(optional ? 'optional' : '');
      momentChip.show(moment ? `from ${momentText(moment.seconds)}${hostOf(moment)}` : '');
      apply();
    };
    const apply = () => {
      const live = desk.figures.get();
      dom.classList.toggle('step-left-out', live !== null && !holds(live, String(current.attrs.when)));
    };
    show();
    const stop = desk.figures.listen(apply);

    const keep = (name: 'title' | 'mark', value: string) => act((pos) => typeAttribute(editor, pos, name, value))();
    title.addEventListener('input', () => keep('title', title.value));
    mark.addEventListener('input', () => keep('mark', mark.value));
    for (const field of [title, mark]) {
      field.addEventListener('keydown', (event) => {
        if (
          fieldKey(
            event,
            editor,
            act((pos) => intoText(editor, pos)),
          )
        )
          event.preventDefault();
      });
    }

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
        event.target instanceof Node && (head.contains(event.target) || facts.contains(event.target)),
      ignoreMutation: (mutation) => mutation.type !== 'selection' && !contentDOM.contains(mutation.target),
      destroy: stop,
    };
  };
}

/** A fact over the title that opens its field; hidden while there is nothing to say. */
function chip(icon: IconName, act: () => void): { dom: HTMLButtonElement; show: (words: string) => void } {
  const dom = document.createElement('button');
  dom.type = 'button';
  dom.className = 'step-chip';
  const text = document.createElement('span');
  dom.append(iconSvg(icon), text);
  dom.addEventListener('click', act);
  return {
    dom,
    show(words) {
      dom.hidden = words === '';
      text.textContent = words;
    },
  };
}

const hostOf = ({ address }: VideoMoment): string =>
  address === null ? ', no address yet' : ` at ${new URL(address).hostname.replace(/^www\./, '')}`;

/** Keys that mean the write-up and not the field. True when the key was taken. */
function fieldKey(event: KeyboardEvent, editor: Editor, leave: () => void): boolean {
  const held = event.ctrlKey || event.metaKey;
  if ((event.key === 'Enter' && !held) || event.key === 'ArrowDown' || event.key === 'Escape') {
    if (event.isComposing) return false;
    leave();
    return true;
  }
  if (!held) return false;
  const key = event.key.toLowerCase();
  if (key === 'z') return event.shiftKey ? editor.commands.redo() : editor.commands.undo();
  if (key === 'y') return editor.commands.redo();
  return false;
}

function intoText(editor: Editor, pos: number) {
  const { state, view } = editor;
  view.dispatch(state.tr.setSelection(TextSelection.near(state.doc.resolve(pos + 1), 1)).scrollIntoView());
  view.focus();
}
