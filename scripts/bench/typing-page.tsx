/** Runs in the browser: the desk's write-up column with a long write-up, or a plain text editor with as many words. */
import { Editor } from '@tiptap/core';
import { StarterKit } from '@tiptap/starter-kit';
import { createRoot } from 'react-dom/client';
import { createDeskStore } from '@/features/workroom/desk/desk-store';
import { WriteUpColumn } from '@/features/workroom/desk/WriteUpColumn';
import type { OpenProject } from '@/features/projects/project';
import '@/styles/tokens.css';
import '@/styles/article.css';
import '@/styles/measure.css';
import '@/styles/drawing.css';
import '@/styles/writeup.css';
import '@/styles/writeup-blocks.css';
import '@/styles/writeup-editor.css';

declare global {
  interface Window {
    mountOurs: (project: OpenProject) => Promise<void>;
    mountPlain: (paragraphs: readonly string[]) => Promise<void>;
    /** Milliseconds that each key took, from its coming to the page laid out anew. */
    type: (keys: number) => Promise<number[]>;
  }
}

const place = () => {
  const root = document.createElement('div');
  document.body.replaceChildren(root);
  return root;
};
const rest = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms));

window.mountOurs = async (project) => {
  const store = createDeskStore(project);
  // The desk shows the proof list at all times.
  store.$proof.listen(() => undefined);
  createRoot(place()).render(<WriteUpColumn store={store} projectId={project.id} />);
  while (!document.querySelector('.ProseMirror .step')) await rest(50);
  await rest(1500);
};

window.mountPlain = async (paragraphs) => {
  const content = paragraphs.map((text) => ({ type: 'paragraph', content: [{ type: 'text', text }] }));
  new Editor({ element: place(), extensions: [StarterKit], content: { type: 'doc', content }, injectCSS: false });
  await rest(500);
};

window.type = async (keys) => {
  const text = document.querySelector<HTMLElement>('.ProseMirror');
  const paragraphs = text?.querySelectorAll('p') ?? [];
  const middle = paragraphs[Math.floor(paragraphs.length / 2)];
  if (!text || !middle) throw new Error('There is nothing to type in.');
  text.focus();
  middle.scrollIntoView({ block: 'center' });
  getSelection()?.collapse(middle.firstChild, 3);
  await rest(300);
  const times: number[] = [];
  for (let n = 0; n < keys; n += 1) {
    const start = performance.now();
    document.execCommand('insertText', false, n % 6 === 5 ? ' ' : 'e');
    // What observers and React do of it comes in tasks of its own.
    await new Promise((resolve) => {
      const { port1, port2 } = new MessageChannel();
      port1.onmessage = resolve;
      port2.postMessage(null);
    });
    text.getBoundingClientRect();
    times.push(performance.now() - start);
    await rest(20);
  }
  return times;
};
