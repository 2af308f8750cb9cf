import { expect, it } from 'vitest';
import { placesFor } from '@/layouts/site-places';

const placesOf = (role: Parameters<typeof placesFor>[0]) => placesFor(role).map(({ place }) => place);

it('offers the list to visitors and readers', () => {
  expect(placesOf(null)).toEqual(['projects', 'handbook', 'subscribe']);
  expect(placesOf('reader')).toEqual(['projects', 'handbook', 'subscribe']);
});

it('offers the workroom to authors and admins', () => {
  expect(placesOf('author')).toEqual(['projects', 'handbook', 'workroom']);
  expect(placesOf('admin')).toEqual(['projects', 'handbook', 'workroom']);
});
