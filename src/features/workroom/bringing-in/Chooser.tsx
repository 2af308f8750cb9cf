import { useState, type ChangeEvent, type ClipboardEvent } from 'react';
import { Field } from '@/components/Field';
import type { BringingIn } from './use-bringing-in';

/** The first page of the dialog: a text is pasted or chosen. */
export function Chooser({ bringing, ready }: { readonly bringing: BringingIn; readonly ready: boolean }) {
  const [text, setText] = useState('');
  const choose = async (event: ChangeEvent<HTMLInputElement>) => {
    const [file] = event.target.files ?? [];
    event.target.value = '';
    if (file) bringing.read(await file.text(), file.name);
  };
  const paste = (event: ClipboardEvent) => {
    // Copied from a document, its headings and lists tell where steps begin.
    const html = event.clipboardData.getData('text/html');
    if (html === '' || text !== '' || !/<(?:h[1-6]|ol|p)\b/i.test(html)) return;
    event.preventDefault();
    bringing.read(html, 'Pasted document', 'html');
  };
  return (
    <form
      className="dialog-form"
      onSubmit={(event) => {
        event.preventDefault();
        bringing.read(text);
      }}
    >
      <p>
        A talk with its times, an old article, notes: it is split into steps, and every measurement in it is looked up.
        Nothing becomes live before you say so, and the original is kept.
      </p>
      <Field label="Text" hint="Plain text, WebVTT or SRT captions, lines that begin with [4:05], or a document.">
        {(control) => (
          <textarea
            {...control}
            className="input"
            rows={9}
            autoFocus
            value={text}
            onChange={(event) => setText(event.currentTarget.value)}
            onPaste={paste}
          />
        )}
      </Field>
      {bringing.trouble === null ? null : (
        <p className="problem" role="alert">
          {bringing.trouble}
        </p>
      )}
      {ready ? null : <p className="note">Mend the pattern first: numbers are matched to its measures.</p>}
      <div className="dialog-deeds">
        <button type="submit" className="tab-button" disabled={!ready || text.trim() === ''}>
          Read it
        </button>
        <label className="btn file-button">
          Choose a file
          <input
            type="file"
            className="visually-hidden"
            accept=".txt,.vtt,.srt,.html,.htm,text/plain,text/vtt,text/html"
            disabled={!ready}
            onChange={(event) => void choose(event)}
          />
        </label>
      </div>
    </form>
  );
}
