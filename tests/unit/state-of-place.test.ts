import { describe, expect, test } from 'vitest';
import { stateOf } from '@/features/fields/state';

describe('the state a field lies in', () => {
  test.each([
    ['Ames', 42.03, -93.62, 'IA'],
    ['Champaign', 40.12, -88.24, 'IL'],
    ['Marquette, beyond the lake', 46.55, -87.4, 'MI'],
    ['Greenville', 33.41, -91.06, 'MS'],
    ['Raleigh', 35.78, -78.64, 'NC'],
    ['Fargo', 46.87, -96.8, 'ND'],
    ['Omaha, west of the river', 41.26, -96.0, 'NE'],
    ['Winnipeg, in Canada', 49.9, -97.14, null],
    ['the Gulf', 27.0, -90.0, null],
  ])('%s', (_, latitude, longitude, state) => expect(stateOf(latitude, longitude)).toBe(state));
});
