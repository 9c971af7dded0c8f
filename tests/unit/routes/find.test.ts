import { describe, expect, it } from 'vitest';
import { findPlaces, gatherPlaces } from '../../../src/components/Find.tsx';
import { searchReference } from '../../../src/routes/language/reference.ts';

const notebook = { id: 'n', title: 'Working fluid K-7' };
const group = { id: 'g', name: 'Working Fluids, Hallowmere Works' };
const places = gatherPlaces({
  recentModels: [
    {
      id: 'm',
      title: 'Hard core with mean-field attraction',
      updatedAt: '2026-01-01T00:00:00Z',
      latestVersion: null,
      notebook,
      group,
    },
  ],
  jobs: [],
  events: [],
  groups: [
    {
      ...group,
      role: 'editor',
      notebooks: [
        { ...notebook, introduction: '', modelCount: 1, updatedAt: '2026-01-01T00:00:00Z' },
      ],
    },
  ],
});

describe('finding', () => {
  it('finds by any words of the name or of the place, in any order', () => {
    expect(findPlaces(places, 'attraction hard').map(({ to }) => to)).toEqual(['/models/m']);
    expect(findPlaces(places, 'k-7').map(({ kind }) => kind)).toEqual(['model', 'notebook']);
    expect(findPlaces(places, 'hallowmere group')).toHaveLength(1);
    expect(findPlaces(places, 'absent')).toEqual([]);
  });
});

describe('the reference of the language', () => {
  it('is searched by names, words and examples', () => {
    expect(searchReference('').length).toBeGreaterThan(5);
    expect(searchReference('joule–thomson')[0]?.entries[0]?.name).toBe('mu_JT');
    expect(searchReference('between')[0]?.entries[0]?.name).toBe('parameter');
    expect(searchReference('zzz')).toEqual([]);
  });
});
