import { formatAcres, formatBushels, formatNumber } from '@/lib/format';
import { renderMail } from '@/lib/mail/layout';
import { CAUTIONS } from '@/lib/ui/cautions';

/** Words of the mails that a plan sends at each step. */

interface About {
  /** Who it goes to. */
  name: string;
  operationName: string;
  dealershipName: string;
  season: number;
  /** Address of the plan. */
  link: string;
  /** Who took the step, and the word they gave with it. */
  by: string;
  word?: string;
}

const FOOT = `${CAUTIONS.yield} Mail at each step of a plan can be turned off in your account.`;

function mail(about: About, subject: string, paragraphs: string[]) {
  const said = about.word ? [`${about.by} writes: “${about.word}”`] : [];
  return {
    subject,
    ...renderMail({
      greeting: `Hello ${about.name},`,
      paragraphs: [...paragraphs, ...said],
      button: { label: 'Open the plan', url: about.link },
      foot: FOOT,
    }),
  };
}

/** To the grower: a plan stands ready to be agreed. */
export function proposedMail(about: About, figures: { fields: number; acres: number; units: number; expected: number | null }) {
  return mail(about, `Your ${about.season} planting plan is ready to look at`, [
    `${about.by} of ${about.dealershipName} proposes the ${about.season} planting plan of ${about.operationName}: ${figures.fields} fields, ${formatAcres(figures.acres)} ac, ${formatNumber(figures.units)} units, ${formatBushels(figures.expected)} bu/ac expected.`,
    'Agree to it, or ask for a change with a word. The seed is held for you meanwhile.',
  ]);
}

/** To the grower: the proposal was taken back. */
export function withdrawnMail(about: About) {
  return mail(about, `The ${about.season} planting plan was taken back for a change`, [
    `${about.by} took back the proposal for ${about.operationName} to change it. You will hear when it is proposed again.`,
  ]);
}

/** To the rep: the grower agreed. */
export function agreedMail(about: About, signedName: string) {
  return mail(about, `${about.operationName} agreed to the ${about.season} plan`, [
    `${signedName} agreed to the ${about.season} planting plan of ${about.operationName}. Its seed is reserved and its ledgers are frozen.`,
  ]);
}

/** To the grower: what they agreed to, for their records. */
export function agreedReceiptMail(about: About, signedName: string, lines: string[]) {
  return mail(about, `You agreed to the ${about.season} planting plan`, [
    `Signed ${signedName} for ${about.operationName}. The plan as agreed:`,
    ...lines,
    CAUTIONS.treatedSeed,
  ]);
}

/** To the rep: the grower wants something changed. */
export function changeAskedMail(about: About) {
  return mail(about, `${about.operationName} asks for a change of the ${about.season} plan`, [
    `${about.by} asks for a change of the ${about.season} planting plan of ${about.operationName}. Its seed is free again until it is proposed anew.`,
  ]);
}

/** To the grower: an agreed plan was opened again. */
export function reopenedMail(about: About) {
  return mail(about, `The agreed ${about.season} plan was opened again`, [
    `${about.by} opened the agreed plan of ${about.operationName} again. What you agreed to stands in its history; you will be asked to agree anew.`,
  ]);
}
