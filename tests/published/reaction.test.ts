import { describe, expect, test } from 'vitest';
import { reactionClass } from '@/features/soil/reaction';

/** USDA Soil Survey Manual, reaction classes (SSSA Glossary of Soil Science Terms; the two most acid classes from memory). */
describe('soil reaction classes', () => {
  test.each([
    [3.4, 'ultra acid'],
    [3.5, 'extremely acid'],
    [4.4, 'extremely acid'],
    [4.5, 'very strongly acid'],
    [5.0, 'very strongly acid'],
    [5.05, 'strongly acid'],
    [5.5, 'strongly acid'],
    [5.6, 'moderately acid'],
    [6.0, 'moderately acid'],
    [6.1, 'slightly acid'],
    [6.5, 'slightly acid'],
    [6.6, 'neutral'],
    [7.3, 'neutral'],
    [7.35, 'slightly alkaline'],
    [7.8, 'slightly alkaline'],
    [7.9, 'moderately alkaline'],
    [8.4, 'moderately alkaline'],
    [8.5, 'strongly alkaline'],
    [9.0, 'strongly alkaline'],
    [9.1, 'very strongly alkaline'],
  ])('pH %s is %s', (ph, name) => expect(reactionClass(ph)).toBe(name));

  test('65 is no pH', () => expect(() => reactionClass(65)).toThrow(RangeError));
});
