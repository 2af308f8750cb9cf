import { describe, expect, it } from 'vitest';
import { bounceAddress, listHeaders, senderParts } from '@/features/mailing/sender';

const facts = { domain: 'place.example', siteUrl: 'https://boxes.example', token: 'a/b' };

describe('who a mail is from', () => {
  it('is read from a name with an address, and from an address alone', () => {
    expect(senderParts('Seed Circle <letters@place.example>')).toEqual({
      name: 'Seed Circle',
      address: 'letters@place.example',
      domain: 'place.example',
    });
    expect(senderParts('"Seed, Circle" <letters@place.example>').name).toBe('Seed, Circle');
    expect(senderParts('letters@place.example')).toEqual({
      name: '',
      address: 'letters@place.example',
      domain: 'place.example',
    });
  });
  it('tells each delivery by the address that refusals come back to', () => {
    expect(bounceAddress('<d.0a1b@place.example>', 'place.example')).toBe('b+0a1b@place.example');
  });
});

describe('list headers', () => {
  it('say how to leave with one click', () => {
    expect(listHeaders({ ...facts, listName: 'Seed Circle' })).toEqual({
      'List-Id': '"Seed Circle" <projects.place.example>',
      'List-Unsubscribe': '<https://boxes.example/unsubscribe?t=a%2Fb>',
      'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click',
    });
  });
  it('hold a name with other letters as encoded words, the id in plain letters', () => {
    const id = listHeaders({ ...facts, listName: 'Größe' })['List-Id'];
    expect(id).toBe('=?utf-8?B?R3LDtsOfZQ==?= <projects.place.example>');
  });
  it('cannot be broken out of', () => {
    expect(listHeaders({ ...facts, listName: 'A"\r\nBcc: x@y.example' })['List-Id']).toBe(
      '"ABcc: x@y.example" <projects.place.example>',
    );
  });
});
