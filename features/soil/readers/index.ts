import { delimited } from './delimited';
import { modusJson } from './modus-json';
import { modusXml } from './modus-xml';
import { points } from './points';
import type { SoilReader } from './table';
import { workbook } from './workbook';

/** Formats of soil tests, in the order they are asked which files are theirs. */
export const SOIL_READERS: readonly SoilReader[] = [points, workbook, modusXml, modusJson, delimited];
