import { expect, test } from 'vitest';
import { bandClasses } from '#src/chem/assignment/band-classes.ts';
import { bandClasses as stored } from '#src/db/schema/index.ts';

test('the table of bands takes the classes that the chemistry knows', () => {
  expect(stored).toEqual(bandClasses);
});
