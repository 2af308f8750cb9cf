import { describe, expect, it } from 'vitest';
import { accessTo, includesRole } from '@/features/accounts/access';

describe('who may go where', () => {
  it.each([
    ['/', 'all'],
    ['/projects', 'all'],
    ['/projects/seed-box/sheet.pdf', 'all'],
    ['/account', 'reader'],
    ['/workroom', 'author'],
    ['/workroom/', 'author'],
    ['/workroom/draft/mailing', 'author'],
    ['/admin', 'admin'],
    ['/api/admin/people/x', 'admin'],
    ['/dev/mailbox', 'this machine'],
    ['/unsubscribe', 'all'],
  ])('%s is for %s', (path, access) => {
    expect(accessTo(path)).toBe(access);
  });

  it.each([
    '/workrooms',
    '/admin.php',
    '/api',
    '/api/',
    '/api/nothing',
    '/.env',
    '/projectsx',
    // The sign-in library's own doors, where nobody counts the tries.
    '/api/auth/callback/password',
    '/api/auth/signin/link',
    '/api/auth/signin',
    '/api/auth/csrf',
    '/api/auth/callback/link',
    '/api/auth/signout',
    '/api/auth/session/x',
  ])('%s is for nobody', (path) => {
    expect(accessTo(path)).toBeNull();
  });

  it.each([
    '/projects/..%2fadmin',
    '/projects/%2E%2E/admin',
    '//admin',
    '/projects//admin',
    '/projects/..\\admin',
    '/projects/%5cadmin',
  ])('%s, which may mean another file, is for nobody', (path) => {
    expect(accessTo(path)).toBeNull();
  });

  it('an admin may do what an author may, an author what a reader may, and never the other way', () => {
    expect(includesRole('admin', 'author')).toBe(true);
    expect(includesRole('author', 'reader')).toBe(true);
    expect(includesRole('reader', 'author')).toBe(false);
    expect(includesRole('author', 'admin')).toBe(false);
  });
});
