import { PICTURE_BYTES } from '../pictures';

export interface SentPicture {
  readonly id: string;
  readonly width: number;
  readonly height: number;
}
export type SendPicture = (
  file: File,
  options: { readonly onProgress: (part: number) => void; readonly signal: AbortSignal },
) => Promise<{ readonly ok: true; readonly picture: SentPicture } | { readonly ok: false; readonly sentence: string }>;

/**
 * Sends pictures to a project, one after the other. Progress goes from 0 to 1 while the file is on its way; the server
 * then needs a moment to encode it. Every failure is a sentence; stopping it gives an empty one.
 */
export function pictureSender(projectId: string, address = '/api/uploads'): SendPicture {
  let last: Promise<unknown> = Promise.resolve();
  return (file, options) => {
    if (file.size > PICTURE_BYTES) {
      return Promise.resolve({
        ok: false,
        sentence: `${file.name || 'The picture'} is larger than 12 MB. Make it smaller, or save it as JPEG.`,
      });
    }
    const turn = last.then(() => send(projectId, address, file, options));
    last = turn;
    return turn;
  };
}

function send(
  projectId: string,
  address: string,
  file: File,
  { onProgress, signal }: Parameters<SendPicture>[1],
): ReturnType<SendPicture> {
  return new Promise((resolve) => {
    const fail = (sentence: string) => resolve({ ok: false, sentence });
    if (signal.aborted) return fail('');
    const form = new FormData();
    form.set('project', projectId);
    form.set('picture', file);
    // fetch cannot tell how much has been sent.
    const request = new XMLHttpRequest();
    request.open('POST', address);
    request.responseType = 'text';
    request.upload.addEventListener(
      'progress',
      ({ loaded, total, lengthComputable }) => lengthComputable && onProgress(loaded / total),
    );
    request.addEventListener('load', () => {
      const answer = parse(request.responseText);
      if (
        request.status === 201 &&
        typeof answer.id === 'string' &&
        typeof answer.width === 'number' &&
        typeof answer.height === 'number'
      ) {
        return resolve({ ok: true, picture: { id: answer.id, width: answer.width, height: answer.height } });
      }
      fail(
        typeof answer.detail === 'string'
          ? answer.detail
          : `The site answered ${request.status}. Try again in a moment.`,
      );
    });
    request.addEventListener('error', () =>
      fail('The picture did not get through. Check the connection, then try again.'),
    );
    request.addEventListener('abort', () => fail(''));
    signal.addEventListener('abort', () => request.abort(), { once: true });
    request.send(form);
  });
}

function parse(text: string): Record<string, unknown> {
  try {
    const value: unknown = JSON.parse(text);
    return typeof value === 'object' && value !== null ? (value as Record<string, unknown>) : {};
  } catch {
    return {};
  }
}
