import { describe, expect, it } from 'vitest';
import { returnPath } from '@/features/accounts/return-path';

describe('the page to go on to after signing in', () => {
  it.each(['/workroom', '/projects/seed-box?inside-width=200mm&units=mm', '/account#delete-h'])(
    '%s is gone on to',
    (path) => {
      expect(returnPath(path)).toBe(path);
    },
  );

  it.each([
    'https://elsewhere.example/',
    '//elsewhere.example',
    '/\\elsewhere.example',
    '\\\\elsewhere.example',
    '/\t/elsewhere.example',
    'javascript:alert(1)',
    'workroom',
    '',
    null,
    undefined,
    '/sign-in',
    '/sign-in/confirm?token=x',
    '/sign-out',
    '/api/account/export',
    '/projects\r\nSet-Cookie: x=y',
    '/./sign-in',
    '/projects/../sign-out',
  ])('%j is not gone on to', (path) => {
    expect(returnPath(path, '/projects')).toBe('/projects');
  });
});
