/** Stage dates of the plan as an iCalendar file (RFC 5545): whole days, one event a field and stage. Pure. */
import { formatBand } from '@/lib/format';
import { CAUTIONS } from '@/lib/ui/cautions';
import { lineName, type PlanView } from '../model';

const STAGES = [
  ['r1', 'R1, first bloom'],
  ['r5', 'R5, seed fills'],
  ['r7', 'R7, first ripe pod'],
  ['r8', 'R8, full ripe'],
] as const;

/** Calendar text. `madeOn` is an ISO date. */
export function planCalendar(view: PlanView, madeOn: string): string {
  const events = view.lines.flatMap((line) => {
    const { assessment, variety } = line;
    if (!assessment || !variety) return [];
    return STAGES.flatMap(([stage, words]) => {
      const day = assessment.season[stage];
      if (!day) return [];
      return [
        'BEGIN:VEVENT',
        `UID:${line.fieldId}-${(line.partName || 'whole').replace(/\W+/g, '')}-${view.season}-${stage}@hilum`,
        `DTSTAMP:${compact(madeOn)}T000000Z`,
        `DTSTART;VALUE=DATE:${compact(day)}`,
        `SUMMARY:${escapeText(`${lineName(line)}: ${words} (${variety.code})`)}`,
        `DESCRIPTION:${escapeText(`Expected from normal weather; a year may differ by a week. ${formatBand(assessment.low, assessment.high)} bu/ac. ${CAUTIONS.yield}`)}`,
        'TRANSP:TRANSPARENT',
        'END:VEVENT',
      ];
    });
  });
  return [
    'BEGIN:VCALENDAR',
    'VERSION:2.0',
    'PRODID:-//Hilum//Planting plan//EN',
    'CALSCALE:GREGORIAN',
    ...events,
    'END:VCALENDAR',
  ]
    .map(fold)
    .join('');
}

function compact(isoDate: string): string {
  return isoDate.replace(/-/g, '');
}

function escapeText(text: string): string {
  return text.replace(/\\/g, '\\\\').replace(/;/g, '\\;').replace(/,/g, '\\,').replace(/\r?\n/g, '\\n');
}

/** Lines of at most 75 octets, the rest folded with a leading blank (RFC 5545 section 3.1); never inside a character. */
function fold(line: string): string {
  const pieces: string[] = [];
  let piece = '';
  for (const character of line) {
    if (Buffer.byteLength(piece + character, 'utf8') > (pieces.length === 0 ? 75 : 74)) {
      pieces.push(piece);
      piece = '';
    }
    piece += character;
  }
  pieces.push(piece);
  return `${pieces.join('\r\n ')}\r\n`;
}
