import type { Editor } from '@tiptap/core';
import type { ReactNode } from 'react';
import type { DocNode } from '../document';
import type { LiveFigures } from '../live';
import { collectUses } from '../uses';
import { AmountList } from './AmountList';
import { BLOCKS, NOTES, type InsertablePart } from './blocks';
import { ConditionField } from './ConditionField';
import { LinkField } from './LinkField';
import { MeasureField } from './MeasureField';
import { MomentField } from './MomentField';
import { openMeasure, type Opened } from './opened';
import { outlineOf } from './outline';
import { OutlineList } from './OutlineList';
import { PickList } from './PickList';
import { PieceList } from './PieceList';
import { StepList } from './StepList';
import { StrayField } from './StrayField';
import { keepAsTyped, takeStray } from './take-stray';
import { listSteps } from './step-numbers';
import { usualAddress } from './steps';
import {
  goTo,
  insertInline,
  insertPart,
  insertStepRef,
  putMeasure,
  setAttributes,
  setCondition,
  setLink,
} from './writing';

export interface OpenedFieldProps {
  readonly editor: Editor;
  readonly opened: Opened;
  readonly live: LiveFigures | null;
  /** Closes it and gives the caret back to the text. */
  readonly close: () => void;
  /** Asks for another thing in its place. */
  readonly reopen: (opened: Opened) => void;
  /** Closes it alone, when what is put in takes the caret. */
  readonly leave: () => void;
}

/** The field or list that was asked for; taking something from it changes the write-up. */
export function OpenedField({ editor, opened, live, close, leave, reopen }: OpenedFieldProps): ReactNode {
  const done = (act: () => void) => {
    act();
    close();
  };
  const parts = (list: readonly InsertablePart[]) => (
    <PickList
      items={list.map(({ name, label, small, key }) => ({
        key: name,
        label,
        small: key === undefined ? small : `${small} · Alt Shift ${key}`,
        take: () => {
          leave();
          insertPart(editor, name);
        },
      }))}
    />
  );
  switch (opened.type) {
    case 'measure':
      return (
        <MeasureField
          live={live}
          begin={opened.begin}
          changing={opened.changing}
          onTake={(text) => done(() => putMeasure(editor, opened, text))}
        />
      );
    case 'stray':
      return (
        <StrayField
          stray={opened.stray}
          live={opened.live}
          onTake={(match) => done(() => takeStray(editor, opened, match))}
          onKeep={() => done(() => keepAsTyped(editor, opened))}
          onOther={() => reopen(openMeasure(editor, opened))}
        />
      );
    case 'phrase':
      return (
        <ConditionField
          live={live}
          of="phrase"
          begin={opened.when}
          onTake={(when) => done(() => setCondition(editor, opened, when))}
        />
      );
    case 'when':
      return (
        <ConditionField
          live={live}
          of="step"
          begin={opened.when}
          optional={opened.optional}
          onTake={(when, optional) => done(() => setAttributes(editor, opened.from, { when, optional }))}
        />
      );
    case 'moment':
      return (
        <MomentField
          begin={opened.moment}
          usualAddress={usualAddress(editor, opened.from)}
          onTake={(moment) => done(() => setAttributes(editor, opened.from, { moment }))}
        />
      );
    case 'piece':
      return (
        <PieceList
          figures={live?.figures ?? null}
          shown={new Set(collectUses(editor.getJSON() as DocNode).pieces.map(({ piece }) => piece))}
          onTake={(piece) => {
            leave();
            insertPart(editor, 'pieceCard', { piece });
          }}
        />
      );
    case 'step number':
      return (
        <StepList
          steps={listSteps(editor.state.doc, live)}
          onTake={({ pos }) => done(() => insertStepRef(editor, pos))}
        />
      );
    case 'note':
      return parts(NOTES);
    case 'block':
      return parts(BLOCKS);
    case 'outline':
      return (
        <OutlineList items={outlineOf(editor.state.doc, live)} onTake={({ pos }) => done(() => goTo(editor, pos))} />
      );
    case 'amount':
      return (
        <AmountList
          figures={live?.figures ?? null}
          onTake={(of) => done(() => insertInline(editor, 'amount', { of }))}
        />
      );
    case 'link':
      return (
        <LinkField
          href={opened.href}
          onTake={(href) => done(() => setLink(editor, href))}
          onRemove={() => done(() => setLink(editor, null))}
        />
      );
  }
}
