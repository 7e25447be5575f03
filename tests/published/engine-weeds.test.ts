import { describe, expect, test } from 'vitest';
import { groupOf, sitesOfAction } from '@/features/placement/engine/weeds/sites-of-action';

/** WSSA groups (the same numbers as HRAC 2020), from memory; those marked * read in the Iowa State 2015 Herbicide Guide. */
const GROUPS: [number, string[]][] = [
  [1, ['clethodim', 'sethoxydim', 'quizalofop', 'fluazifop', 'fenoxaprop']],
  [2, ['imazethapyr' /* * */, 'imazaquin', 'imazamox', 'chlorimuron', 'thifensulfuron', 'cloransulam', 'flumetsulam']],
  [3, ['trifluralin', 'pendimethalin', 'ethalfluralin']],
  [4, ['2,4-D choline', 'dicamba', '2,4-DB', 'halauxifen']],
  [5, ['metribuzin']],
  [6, ['bentazon']],
  [9, ['glyphosate']],
  [10, ['glufosinate']],
  [13, ['clomazone']],
  [
    14,
    [
      'fomesafen' /* * */,
      'lactofen',
      'acifluorfen',
      'flumioxazin' /* * */,
      'sulfentrazone',
      'saflufenacil' /* * */,
      'flumiclorac',
      'fluthiacet',
    ],
  ],
  [15, ['S-metolachlor', 'metolachlor' /* * */, 'acetochlor', 'dimethenamid-P', 'pyroxasulfone']],
  [22, ['paraquat']],
  [27, ['isoxaflutole', 'mesotrione']],
];
const ACTIVES = GROUPS.flatMap(([group, actives]) => actives.map((active) => [active, group] as const));

describe('herbicide sites of action against the published groups', () => {
  test.each(ACTIVES)('%s is group %d', (active, group) => expect(groupOf(active)).toBe(group));

  test('glyphosate, clethodim, S-metolachlor and fomesafen are four groups: 1, 9, 14 and 15', () => {
    expect(sitesOfAction(['glyphosate', 'clethodim', 'S-metolachlor', 'fomesafen']).groups).toEqual([1, 9, 14, 15]);
  });

  test('against a broadleaf weed that withstands glyphosate and group 14, only group 15 of them is left', () => {
    const programme = ['glyphosate', 'clethodim', 'S-metolachlor', 'fomesafen'];
    expect(sitesOfAction(programme, [9, 14]).effectiveOnBroadleaf).toEqual([15]);
  });

  test('a name the table does not hold is handed back, not guessed', () => {
    expect(sitesOfAction(['glyphosate', 'moonlight'])).toEqual({
      groups: [9],
      effectiveOnBroadleaf: [9],
      unknown: ['moonlight'],
    });
  });

  test('none was silently dropped', () => {
    expect(ACTIVES).toHaveLength(40);
    expect(new Set(ACTIVES.map(([active]) => active)).size).toBe(ACTIVES.length);
  });
});
