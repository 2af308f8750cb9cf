import { json, problem, readBytes } from '@/features/http/problem';
import { mayWorkOn, type Asker } from '@/features/projects/project-access.server';
import { PICTURE_LIMITS } from './limits';
import { explainPictureFault, pictureFaults } from './messages';
import { storeUpload } from './uploads.server';

/** Room for the multipart frame and the project's id round the picture. */
const FRAME = 64 * 1024;

const STATUS: Record<string, number> = { 'too-large': 413, 'wrong-kind': 415, 'project-full': 409, busy: 503 };

/**
 * One picture as multipart form data: `project` (its id) and `picture` (the file). Gives 201 with `{ id, width, height }`,
 * or a problem document that says what is wrong with the picture. Bytes are counted as they arrive.
 */
export async function receiveUpload(request: Request, user: Asker): Promise<Response> {
  const type = request.headers.get('content-type') ?? '';
  if (!/^multipart\/form-data\s*;/i.test(type)) {
    return problem(415, 'Not a form with a picture', {
      detail: 'Send the picture as multipart/form-data.',
      code: 'not-multipart',
    });
  }
  const body = await readBytes(request, PICTURE_LIMITS.bytes + FRAME);
  if (!body) {
    const detail = 'The file is larger than 12 MB. Make it smaller, or save it as JPEG.';
    return problem(413, 'The picture is too large', { detail, code: 'too-large' });
  }
  let form: FormData;
  try {
    form = await new Response(body as BodyInit, { headers: { 'content-type': type } }).formData();
  } catch {
    return problem(400, 'The form does not read', {
      detail: 'What was sent was cut short. Send the picture again.',
      code: 'bad-form',
    });
  }
  const projectId = form.get('project');
  const picture = form.get('picture');
  if (typeof projectId !== 'string' || !(picture instanceof File)) {
    return problem(422, 'Something is missing', {
      detail: 'The form needs a “project” and a “picture” file.',
      code: 'does-not-fit',
    });
  }
  if (!mayWorkOn(projectId, user)) {
    return problem(404, 'No such project', { detail: 'There is no such project among yours.', code: 'not-found' });
  }
  const stored = await storeUpload({ ownerId: user.id, projectId, bytes: new Uint8Array(await picture.arrayBuffer()) });
  if (stored.ok) return json(stored.value, { status: 201 });
  const fault = stored.faults[0] ?? pictureFaults.unreadable();
  return problem(STATUS[fault.code] ?? 422, 'The picture was not taken', {
    detail: explainPictureFault(fault),
    code: fault.code,
  });
}
