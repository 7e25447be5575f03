/** Advice on the weed programme: it costs nothing and moves no rank. The label is the law. */
import { acidityOf } from '../ground/acidity';
import type { Site } from '../site';
import { listed, percent } from '../words';
import { sitesOfAction } from './sites-of-action';

const LABEL = 'The label is the law; follow it and state rules.';
/** Metribuzin and sulfentrazone hurt sensitive varieties from this pH on (from memory of labels and guides). */
const INJURY_PH = 7.5;

function programmeAdvice(site: Site): string[] {
  const { field } = site;
  const advice: string[] = [];
  if (field.weedProgrammeActives.length > 0) {
    const { groups, effectiveOnBroadleaf, unknown } = sitesOfAction(field.weedProgrammeActives);
    const count = effectiveOnBroadleaf.length;
    const wanted =
      count >= 2 ? 'two or more wanted, if your weeds do not withstand them' : 'two or more wanted: add another group';
    advice.push(
      `${count} ${count === 1 ? 'site' : 'sites'} of action on broadleaf weeds (groups ${listed(groups.map(String)) || 'none'}); ${wanted}. ${LABEL}`,
    );
    if (unknown.length > 0) advice.push(`${listed(unknown)}: group not known here, look it up on the label.`);
    const names = field.weedProgrammeActives.map((active) => active.trim().toLowerCase());
    const touchy = ['metribuzin', 'sulfentrazone'].filter((active) => names.includes(active));
    const high = acidityOf(site).shareAbove(INJURY_PH - 0.01);
    if (touchy.length > 0 && high > 0.02 && acidityOf(site).tested) {
      advice.push(
        `${percent(high)} of the field is at pH 7.5 or more: ${listed(touchy)} can hurt sensitive varieties there. ${LABEL}`,
      );
    }
  }
  if (field.sensitiveNeighbours.length > 0) {
    advice.push(`${listed(field.sensitiveNeighbours)} next door: mind drift, buffers and wind. ${LABEL}`);
  }
  return advice;
}

/** Advice for a field's programme, the same for every variety. */
export function weedAdvice(site: Site): string[] {
  return site.once('weed advice', programmeAdvice);
}
