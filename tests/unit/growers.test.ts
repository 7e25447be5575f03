import { describe, expect, test } from 'vitest';
import type { OperationProgress } from '@/features/growers/model';
import { newOperationSchema } from '@/features/growers/schemas';
import { sorted, sortOf } from '@/features/growers/sort';
import { nextThing, stepsOf } from '@/features/growers/steps';

function progress(given: Partial<OperationProgress> = {}): OperationProgress {
  return {
    id: 'op1',
    name: 'Teal Creek Farms',
    state: 'IA',
    county: 'Franklin',
    archived: false,
    farmCount: 1,
    fieldCount: 7,
    areaAcres: 398.1,
    fieldsWithSoilTests: 7,
    fieldsWithFacts: 7,
    fieldsScored: 7,
    planState: null,
    growers: [{ id: 'p1', name: 'Lena Aldous' }],
    reps: [],
    invitedGrowers: 0,
    lastActivityAt: null,
    ...given,
  };
}

const EMPTY = { fieldCount: 0, areaAcres: 0, fieldsWithSoilTests: 0, fieldsWithFacts: 0, fieldsScored: 0 };

describe('the next thing to do for an operation', () => {
  test.each([
    ['a new one: invite the grower', { ...EMPTY, growers: [] }, 'Invite the grower', '/growers/op1#invite'],
    ['no fields: bring boundaries in', EMPTY, 'Bring in field boundaries', '/fields/import?operation=op1'],
    ['no soil tests: bring them in', { fieldsWithSoilTests: 0 }, 'Bring in soil tests', '/soil/import?operation=op1'],
    ['nothing said of the fields: say it', { fieldsWithFacts: 0 }, 'Say how the fields are farmed', '/fields?operation=op1'],
    ['not scored: score', { fieldsScored: 0 }, 'Score the fields', '/fields?operation=op1'],
    ['no plan: put picks on it', {}, 'Put picks on the plan', '/plans/op1/2027'],
    ['change asked: change it', { planState: 'change asked' }, 'Change the plan as asked', '/plans/op1/2027'],
    ['one field without soil tests holds up no plan', { fieldsWithSoilTests: 6 }, 'Put picks on the plan', '/plans/op1/2027'],
  ])('%s', (_name, given, label, href) => {
    expect(nextThing(progress(given), 2027)).toEqual({ label, href });
  });

  test('a harvested plan with every field known leaves nothing to do', () => {
    expect(nextThing(progress({ planState: 'harvested' }), 2027)).toBeNull();
    expect(nextThing(progress({ planState: 'harvested', fieldsWithSoilTests: 6 }), 2027)?.label).toBe('Bring in soil tests');
  });
});

describe('how far an operation is', () => {
  test('an operation without fields has no step done by counting zero of zero', () => {
    const done = stepsOf(progress({ ...EMPTY, growers: [] }), 2027).filter((step) => step.done);
    expect(done).toEqual([]);
  });

  test('the words carry the number first', () => {
    const words = stepsOf(progress({ fieldsWithSoilTests: 6 }), 2027).map((step) => step.words);
    expect(words).toEqual([
      'Lena Aldous',
      '7 fields, 398.1 ac',
      '6 of 7 fields',
      '7 of 7 fields',
      '7 of 7 fields scored',
      'None yet',
    ]);
  });

  test('an invited grower who has not come yet is said to be invited', () => {
    expect(stepsOf(progress({ growers: [], invitedGrowers: 1 }), 2027)[0]?.words).toContain('Invited');
  });
});

describe('sorting growers', () => {
  const list = [progress({ id: 'a', name: 'Ash', areaAcres: 10 }), progress({ id: 'b', name: 'Birch', areaAcres: 30 })];

  test('by acres, largest first, when asked', () => {
    expect(sorted(list, sortOf('-acres'), 2027).map((one) => one.name)).toEqual(['Birch', 'Ash']);
  });

  test('by name when the address asks for something unknown', () => {
    expect(sortOf('price')).toEqual({ key: 'name', descending: false });
    expect(sortOf(undefined)).toEqual({ key: 'name', descending: false });
  });

  test('equal ones stand by name either way', () => {
    expect(sorted([...list].reverse(), sortOf('-fields'), 2027).map((one) => one.name)).toEqual(['Ash', 'Birch']);
  });
});

describe('a new operation', () => {
  test('needs a name; what is left empty stays unknown', () => {
    expect(newOperationSchema.parse({ name: ' Bergan and Sons ', state: '', county: ' ', repId: '' })).toEqual({
      name: 'Bergan and Sons',
      state: null,
      county: null,
      note: null,
      repId: null,
    });
    expect(newOperationSchema.safeParse({ name: ' ' }).error?.issues[0]?.message).toBe('Write the name of the operation.');
  });

  test('lies in a state that exists', () => {
    expect(newOperationSchema.safeParse({ name: 'Bergan', state: 'ia' }).data?.state).toBe('IA');
    expect(newOperationSchema.safeParse({ name: 'Bergan', state: 'ZZ' }).success).toBe(false);
  });
});
