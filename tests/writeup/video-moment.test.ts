import { expect, it } from 'vitest';
import { momentHref, momentText, readMoment } from '@/writeup/video-moment';

it('is said and read as players show it', () => {
  // 4 × 60 + 12; 3600 + 4 × 60 + 12
  expect([0, 9, 252, 3852].map(momentText)).toEqual(['0:00', '0:09', '4:12', '1:04:12']);
  expect(['0:00', ' 4:12 ', '1:04:12', '252', '90:00'].map(readMoment)).toEqual([0, 252, 3852, 252, 5400]);
  expect(['', '4:60', '1:60:00', '4.12', 'four', '-1', '24:00:00'].map(readMoment)).toEqual(Array(7).fill(null));
});

it('goes to an address by the fragment of W3C Media Fragments 1.0, 4.2.1, unless the address has a fragment', () => {
  expect(momentHref({ seconds: 252, address: 'https://video.example/watch?v=1' })).toBe(
    'https://video.example/watch?v=1#t=252',
  );
  expect(momentHref({ seconds: 252, address: 'https://video.example/1#at=4m12s' })).toBe(
    'https://video.example/1#at=4m12s',
  );
  expect(momentHref({ seconds: 252, address: null })).toBeNull();
});
