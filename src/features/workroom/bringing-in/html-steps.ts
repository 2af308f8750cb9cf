import { DOMParser as SchemaParser } from '@tiptap/pm/model';
import { stepsOfDocument } from '@/features/bringing-in/document-steps';
import type { DraftStep } from '@/features/bringing-in/split-steps';
import type { DocNode } from '@/writeup/document';
import { plainPastedHtml } from '@/writeup/editor/pasted-html';
import { writeUpSchema } from '@/writeup/schema';

/**
 * A document's HTML as steps, by the same cleaning and the same schema as what is pasted into the write-up. The browser's
 * parser makes a document that is never shown, so no script of it runs and nothing is fetched.
 */
export function stepsOfHtml(html: string): readonly DraftStep[] {
  const { body } = new DOMParser().parseFromString(plainPastedHtml(html, null), 'text/html');
  const doc = SchemaParser.fromSchema(writeUpSchema()).parse(body);
  return stepsOfDocument(doc.toJSON() as DocNode);
}
