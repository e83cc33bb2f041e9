import { describe, expect, it } from 'vitest';
import { ownerChoices, ownerNames } from '../../src/view/owner-names';

describe('the names of owners', () => {
  it('stand each once and in order, told apart by every letter', () => {
    const owners = ['Tarnside', null, 'Grid 10', 'tarnside', 'Grid 9', 'Tarnside'];
    expect(ownerNames(owners.map((owner) => ({ owner })))).toEqual([
      'Grid 9',
      'Grid 10',
      'tarnside',
      'Tarnside',
    ]);
    expect(ownerNames([{ owner: null }])).toEqual([]);
  });

  it('of a filter hold the one that is chosen, though no line listed is its', () => {
    expect(ownerChoices(['Pellwater'], undefined)).toEqual(['Pellwater']);
    expect(ownerChoices(['Pellwater'], 'Pellwater')).toEqual(['Pellwater']);
    expect(ownerChoices(['Pellwater'], 'Tarnside')).toEqual(['Pellwater', 'Tarnside']);
  });
});
