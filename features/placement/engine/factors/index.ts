/** The factors in ledger order. To add one: write its file, add it here, give its id a colour, test it against its source. */
import type { Factor } from '../factor';
import { brownStemRot } from './brown-stem-rot';
import { charcoalRot } from './charcoal-rot';
import { compaction } from './compaction';
import { cystNematode } from './cyst-nematode';
import { drought } from './drought';
import { emergence } from './emergence';
import { freeze } from './freeze';
import { frogeye } from './frogeye';
import { height } from './height';
import { maturityZone } from './maturity-zone';
import { mustBeOffBy } from './must-be-off-by';
import { plantingDate } from './planting-date';
import { rowWidth } from './row-width';
import { soilPh } from './soil-ph';
import { standability } from './standability';
import { stemCanker } from './stem-canker';
import { suddenDeath } from './sudden-death';
import { weedProgramme } from './weed-programme';
import { wetFeet } from './wet-feet';
import { whiteMould } from './white-mould';

export const FACTORS: readonly Factor[] = [
  maturityZone,
  freeze,
  soilPh,
  wetFeet,
  compaction,
  rowWidth,
  standability,
  height,
  emergence,
  cystNematode,
  suddenDeath,
  brownStemRot,
  whiteMould,
  frogeye,
  stemCanker,
  charcoalRot,
  drought,
  plantingDate,
  mustBeOffBy,
  weedProgramme,
];
