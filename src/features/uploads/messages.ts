import type { Fault } from '@/engine';
import { PICTURE_LIMITS } from './limits';
import type { PictureKind } from './picture-kind';

const MEGABYTE = 1024 * 1024;
const megabytes = (bytes: number) => `${Math.ceil((bytes / MEGABYTE) * 10) / 10} MB`;
const SAVE_AS = 'Save it as JPEG, PNG or WebP and send that.';

const WHY_NOT: Record<PictureKind, string> = {
  JPEG: 'The JPEG cannot be taken',
  PNG: 'The PNG cannot be taken',
  WebP: 'The WebP cannot be taken',
  GIF: 'This is a GIF, which holds animation and few colours',
  HEIC: 'This is a HEIC photo, as some phones keep them; it cannot be read here',
  AVIF: 'This is an AVIF picture; it cannot be taken here',
  SVG: 'This is an SVG drawing, which may hold programs',
  TIFF: 'This is a TIFF picture',
  PDF: 'This is a PDF document',
  unknown: 'This file is not a picture that is known here',
};

const fault = (code: string, found: string, expected: string, hint: string): Fault => ({
  code,
  where: 'picture',
  found,
  expected,
  hint,
});

/** Everything that can keep a picture from being stored; each is a sentence or two once explained. */
export const pictureFaults = {
  empty: () => fault('empty', 'The file is empty', 'a picture', 'Choose another file.'),
  tooLarge: (bytes: number) =>
    fault(
      'too-large',
      `The file has ${megabytes(bytes)}`,
      `at most ${megabytes(PICTURE_LIMITS.bytes)}`,
      'Make it smaller, or save it as JPEG.',
    ),
  wrongKind: (kind: PictureKind) =>
    fault(
      'wrong-kind',
      WHY_NOT[kind],
      'a JPEG, PNG or WebP picture',
      kind === 'HEIC' ? 'On the phone, share it as JPEG (“most compatible”), or send a screenshot of it.' : SAVE_AS,
    ),
  tooManyPixels: () =>
    fault(
      'too-many-pixels',
      'The picture has too many pixels',
      'at most 40 million pixels',
      'Scale it down and send it again.',
    ),
  unreadable: () =>
    fault(
      'unreadable',
      'The picture is damaged or cut short',
      'a whole picture',
      'Open it on your machine, save it again, and send that.',
    ),
  projectFull: () =>
    fault(
      'project-full',
      `The project has ${PICTURE_LIMITS.perProject} pictures already`,
      `at most ${PICTURE_LIMITS.perProject}`,
      'Begin another project for the rest.',
    ),
  busy: () => fault('busy', 'Many pictures are waiting already', 'a free place', 'Wait a minute, then send it again.'),
};

/** For a person: what was found, what can be taken, what to do. */
export const explainPictureFault = ({ found, expected, hint }: Fault): string =>
  `${found}; wanted is ${expected}. ${hint}`;
