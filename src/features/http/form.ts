import { readBytes } from './problem';

const FORM_LIMIT = 32 * 1024;

/**
 * The text fields of a form that was posted. Null when it is no form or is longer than any of ours; every field that was
 * not sent reads as ''.
 */
export async function readForm(request: Request): Promise<((name: string) => string) | null> {
  const type = request.headers.get('content-type') ?? '';
  if (!/^(application\/x-www-form-urlencoded|multipart\/form-data)\b/i.test(type)) return null;
  const bytes = await readBytes(request, FORM_LIMIT);
  if (!bytes) return null;
  try {
    const form = await new Response(bytes.slice(), { headers: { 'content-type': type } }).formData();
    return (name) => {
      const value = form.get(name);
      return typeof value === 'string' ? value : '';
    };
  } catch {
    return null;
  }
}
