import { answer, type Factor } from '../factor';
import { listed } from '../words';

/** Weed programme: a variety without a tolerance that the programme needs is stopped. It costs no bushels. */
export const weedProgramme: Factor = {
  id: 'weed-programme',
  label: 'Weed programme',
  color: 'factor-weed-programme',
  needs: ['weedProgramme', 'weedProgrammeActives', 'sensitiveNeighbours', 'tolerances'],
  kept({ site, variety }) {
    const source = 'Herbicide label; tolerances are not interchangeable. The label is the law';
    const needed = site.field.weedProgramme;
    if (needed === null) {
      return answer({
        reason: 'weed programme unknown, no variety is stopped for it',
        source,
        asks: [{ fact: 'weedProgramme', words: 'Which herbicide tolerances does the weed programme need?', logDeviation: 0 }],
      });
    }
    const missing = needed.filter((tolerance) => !variety.tolerances.includes(tolerance));
    return answer({
      reason:
        needed.length === 0
          ? 'the programme asks for no tolerance'
          : `has ${listed(needed.filter((one) => !missing.includes(one)))}`,
      source,
      stop: missing.length > 0 ? `not tolerant to ${listed(missing)}, which this field's weed programme needs` : null,
    });
  },
};
