import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { addressFault, emailKey } from '@/features/accounts/email-key';

describe('the compared form of an e-mail address', () => {
  it.each([
    ['ines@quilletlane.example', 'ines@quilletlane.example'],
    ['  Ines@QuilletLane.EXAMPLE\t', 'ines@quilletlane.example'],
    ['ines+seeds@quilletlane.example', 'ines+seeds@quilletlane.example'],
    ['i.nes@quilletlane.example', 'i.nes@quilletlane.example'],
    ["o'dell@quilletlane.example", "o'dell@quilletlane.example"],
    // RFC 3492's and every registry's example: bücher is xn--bcher-kva.
    ['wenna@bücher.example', 'wenna@xn--bcher-kva.example'],
    ['wenna@BÜCHER.example', 'wenna@xn--bcher-kva.example'],
    // e + combining acute accent is the one letter é.
    ['rene\u0301@quilletlane.example', 'ren\u00e9@quilletlane.example'],
  ])('of %j is %j', (typed, key) => {
    expect(emailKey(typed)).toBe(key);
  });

  it.each([
    ['a line break', 'ines@quilletlane.example\r\nBcc: all@quilletlane.example'],
    ['a line break at the end', 'ines@quilletlane.example\n'],
    ['a NUL', 'ines\0@quilletlane.example'],
    ['a quoted local part', '"ines thornbury"@quilletlane.example'],
    ['a space', 'ines thornbury@quilletlane.example'],
    ['two @', 'ines@elsewhere.example@quilletlane.example'],
    ['a full-width @', 'ines＠elsewhere.example@quilletlane.example'],
    ['a ligature', 'ﬁne@quilletlane.example'],
    ['a zero-width space', 'in\u200bes@quilletlane.example'],
    ['a colon', 'invite:ines@quilletlane.example'],
    ['several addresses', 'ines@quilletlane.example,all@quilletlane.example'],
    ['angle brackets', '<ines@quilletlane.example>'],
    ['a domain without a dot', 'ines@localhost'],
    ['an address of a machine', 'ines@192.0.2.1'],
    ['an address of a machine in brackets', 'ines@[192.0.2.1]'],
    ['an empty label', 'ines@quilletlane..example'],
    ['a label that begins with a hyphen', 'ines@-quilletlane.example'],
    ['a dot at the end of the local part', 'ines.@quilletlane.example'],
    ['no local part', '@quilletlane.example'],
    ['no domain', 'ines@'],
    ['a port', 'ines@quilletlane.example:25'],
    ['a path', 'ines@quilletlane.example/all'],
    ['nothing', ''],
    ['a local part of 65 characters', `${'a'.repeat(65)}@quilletlane.example`],
    ['a label of 64 characters', `ines@${'a'.repeat(64)}.example`],
  ])('is refused with %s', (_what, typed) => {
    expect(emailKey(typed)).toBeNull();
  });

  it('is its own compared form, holds one @ and nothing that breaks a header', () => {
    const anything = fc.oneof(
      fc.string({ unit: 'binary' }),
      fc.emailAddress(),
      fc.tuple(fc.string(), fc.domain()).map(([local, domain]) => `${local}@${domain}`),
    );
    fc.assert(
      fc.property(anything, (typed) => {
        const key = emailKey(typed);
        if (key === null) return;
        expect(emailKey(key)).toBe(key);
        expect(key).toMatch(/^[^@\s<>,;:"]+@[a-z0-9.-]+$/);
      }),
      { seed: 20, numRuns: 2000 },
    );
  });
});

describe('an address that letters are sent to', () => {
  it('has letters from a to z before the @, since mail goes out without SMTPUTF8; the domain may have others', () => {
    expect(addressFault('wenna@bücher.example')).toBeNull();
    expect(addressFault('ren\u00e9@quilletlane.example')).toBe(
      'Before the @, only letters from a to z can be written to from here. Use another address.',
    );
    expect(addressFault('wenna')).toBe('That is not an e-mail address: it looks like name@place.example.');
  });
});
