/**
 * What laboratories call their columns. Pure data and the matching of one header against it.
 * To teach a header: add it, squeezed to lower-case words, to the line of what it means.
 */
import type { BufferMethod } from '../lime';
import type { Meaning, PhosphorusMethod } from './meanings';

interface Line {
  meaning: Meaning;
  /** Whole headers, squeezed (see squeeze), parted by bars. Earlier lines and earlier names win. */
  names: readonly string[];
  /** Families of headers (a buffer with its method, an extractant before or after its nutrient). */
  patterns?: readonly RegExp[];
}

/** The lexicon. */
const LEXICON: readonly Line[] = [
  {
    meaning: 'id',
    names: [
      'sample id | sampleid | sample no | sample number | sample num | samplenumber | sample | sample name',
      'sampleno | smp id | smpl id | samp id | samp no | customer sample id | client sample id | your sample id',
      'grower sample id | fmis sample id | point id | pointid | point | pt id | ptid | site id | grid id | grid',
      'grid no | grid number | zone | zone id | bag | bag id | bag no | barcode | id | no | nr',
    ],
  },
  {
    meaning: 'labNumber',
    names: [
      'lab no | lab number | lab num | lab id | labid | labno | lab sample id | lab sample no',
      'laboratory number | laboratory no | laboratory id | report id | labnum',
    ],
  },
  {
    meaning: 'fieldName',
    names: ['field | field name | fieldname | field id | fieldid | field no | fld | fld name | tract'],
  },
  {
    meaning: 'laboratory',
    names: ['laboratory | lab | lab name | laboratory name | labname'],
  },
  {
    meaning: 'sampledOn',
    names: [
      'date sampled | sample date | sampled | sampled on | sampling date | date taken | date collected | collected',
      'collection date | sampledate | datesampled | date | event date | date received | received | date recd',
      'received date | date reported | report date | date rept | processed date | date processed | year | crop year',
    ],
  },
  {
    meaning: 'depthFrom',
    names: [
      'b depth | begin depth | beginning depth | begdepth | starting depth | start depth | top depth | depth top',
      'depth from | upper depth | depth start | from depth | depth begin',
    ],
  },
  {
    meaning: 'depthTo',
    names: [
      'e depth | end depth | ending depth | enddepth | bottom depth | depth bottom | depth to | lower depth',
      'depth end | to depth',
    ],
  },
  {
    meaning: 'depth',
    names: ['depth | sample depth | sampling depth | soil depth | depth range | depthname | core depth'],
  },
  {
    meaning: 'latitude',
    names: [
      'latitude | lat | gps lat | gps latitude | y | y coord | ycoord | point y | lat dd | y wgs84',
      'sample latitude | latitude dd',
    ],
  },
  {
    meaning: 'longitude',
    names: [
      'longitude | lon | long | lng | gps lon | gps long | gps longitude | x | x coord | xcoord | point x',
      'lon dd | long dd | x wgs84 | sample longitude | longitude dd',
    ],
  },
  {
    meaning: 'place',
    names: [
      'lat lon | lat long | latlon | latlong | lat lng | latitude longitude | coordinates | coordinate | gps',
      'gps coordinates | location | geometry | wkt | gps location | position',
    ],
  },
  {
    meaning: 'bufferPh',
    names: [
      'buffer ph | bufferph | buf ph | ph buffer | ph buffered | b ph | bph | ph b | buffer | buffer index',
      'buffer ph index | bi | lime index | lime test index | limeindex | lti | lime buffer | buffer value',
      'buff ph | buffph',
    ],
    patterns: [
      /^(ph )?(smp|sikora|sik|mehlich|mwb|wdrf|woodruff|modified woodruff|adams evans|ae|a e)( buffer| buf| bph)?( ph| index)?$/,
      /^(buffer|bph|b ph|buf|buffer index|lime index|lime test index|lti|bi)( ph)? (smp|sikora|sik|mehlich|mwb|wdrf|woodruff|modified woodruff|adams evans|ae|a e)$/,
    ],
  },
  {
    meaning: 'saltPh',
    names: [
      'salt ph | saltph | ph salt | ph s | phs | s ph | ph cacl2 | cacl2 ph | ph kcl | kcl ph | soil salt ph',
      'ph 0 01m cacl2 | ph 01m cacl2 | ph in cacl2 | ph cacl | ph calcium chloride | phsalt | phcacl2',
    ],
  },
  {
    meaning: 'ph',
    names: [
      'ph | soil ph | soilph | water ph | waterph | ph water | ph w | phw | phwater | w ph | wph | ph 1 1',
      '1 1 ph | 1 1 soil ph | soil ph 1 1 | ph h2o | h2o ph | ph 1 1 water | ph water 1 1 | ph 1 1 h2o | ph soil',
      'ph in water | soil water ph | soil ph water | active ph | ph value | field ph',
    ],
  },
  {
    meaning: 'organicMatterPercent',
    names: [
      'om | o m | organic matter | organicmatter | om loi | organic matter loi | loi om | som',
      'soil organic matter | om walkley black | org matter | organic | humic matter | om lo | loi',
    ],
  },
  {
    meaning: 'cec',
    names: [
      'cec | c e c | cation exchange capacity | cation exchange | sum of cations | ecec | est cec',
      'estimated cec | cec sum | cec sum of cations | cec calculated | calculated cec',
    ],
  },
  {
    meaning: 'carbonatePercent',
    names: [
      'cce | caco3 | carbonate | carbonates | calcium carbonate | calcium carbonate equivalent | free lime',
      'excess lime | total carbonates | cce caco3 | ca carbonate | inorganic carbonate | excess carbonate',
    ],
  },
  {
    meaning: 'electricalConductivity',
    names: [
      'ec | e c | electrical conductivity | conductivity | soluble salts | soluble salt | salts | ec 1 1',
      '1 1 ec | 1 1 s salts | s salts | ss | sol salts | salinity | soluble salts 1 1 | 1 1 soluble salts',
      'ec salts | ece',
    ],
  },
  {
    meaning: 'cystEggsPer100cc',
    names: [
      'scn | scn eggs | eggs | scn egg count | egg count | scn count | soybean cyst nematode',
      'soybean cyst nematode eggs | cyst nematode | cyst eggs | eggs 100cc | scn 100cc | soybean cyst',
      'scn eggs 100cc | cyst nematode eggs',
    ],
  },
  {
    meaning: 'phosphorusPpm',
    names: [
      'p | phosphorus | phosphorous | phos | soil p | p1 | p2 | available p | p available | avail p',
      'extractable p | weak bray | strong bray | bray | p205',
    ],
    patterns: [
      /^(p|p1|p2|phosphorus|phos|available p|soil p|p icp|p col|p p)? ?(bray|bray p|bray p1|bray p2|bray 1|bray 2|bray1|bray2|brayp1|weak bray|strong bray|mehlich|mehlich 3|mehlich3|mehlich iii|m3|m 3|m3 icp|mehlich 3 icp|m3p|m3 p|olsen|olsen bicarb|bicarb|sodium bicarbonate)( p| p1| phosphorus| phos| 1| 2)?$/,
      /^(p1|p2) (weak bray|strong bray|bray)$/,
    ],
  },
  {
    meaning: 'potassiumPpm',
    names: [
      'k | potassium | potash | soil k | k mehlich 3 | mehlich 3 k | m3 k | k m3 | available k | extractable k',
      'exchangeable k | k nh4oac | k ammonium acetate | nh4oac k | k aa | ammonium acetate k | exch k | k icp',
    ],
  },
  {
    meaning: 'calciumPpm',
    names: [
      'ca | calcium | soil ca | ca mehlich 3 | mehlich 3 ca | m3 ca | ca m3 | exchangeable ca | ca nh4oac',
      'ca ammonium acetate | nh4oac ca | ca aa | exch ca | ca icp',
    ],
  },
  {
    meaning: 'magnesiumPpm',
    names: [
      'mg | magnesium | soil mg | mg mehlich 3 | mehlich 3 mg | m3 mg | mg m3 | exchangeable mg | mg nh4oac',
      'mg ammonium acetate | nh4oac mg | mg aa | exch mg | mg icp',
    ],
  },
];

const KNOWN = LEXICON.map((line) => ({ ...line, names: line.names.flatMap((names) => names.split(' | ')) }));

/** Words of a header that are a unit, and what the unit is called here. */
const UNITS: readonly (readonly [string, RegExp])[] = [
  ['lb/ac', /\b(lbs?|pounds?)\s*(\/|per|p)?\s*(ac(re)?s?|a)\b|\bpp2m\b|\blbs?$/i],
  ['meq/100g', /\bm\.?eq\s*(\/|per)?\s*100\s*g(rams?)?\b|\bcmol\w*(\([+c]*\))?\s*\/?\s*kg\b|\bmeq(\/100)?\b/i],
  ['ppb', /\bppb\b/i],
  ['ppm', /\bppm\b|\bmg\s*\/\s*kg\b|\bmg\s+kg\b|\bug\/g\b/i],
  ['g/kg', /\bg\s*\/\s*kg\b/i],
  ['uS/cm', /[uµμ]S\s*\/\s*cm\b|[uµμ]mhos?\s*\/\s*cm\b/i],
  ['dS/m', /\bdS\s*\/?\s*m\b|\bmmhos?\s*\/?\s*cm\b|\bmS\s*\/\s*cm\b/i],
  ['/250cc', /(\/|per)\s*250\s*(cc|cm3|cm³|ml)/i],
  ['/100cc', /(\/|per|\b)\s*100\s*(cc|cm3|cm³|ml)\b/i],
  ['cm', /\bcms?\b|\bcentimet(er|re)s?\b/i],
  ['in', /\binch(es)?\b|\bin\.?$|\(in\.?\)|"$/i],
  ['%', /%|\bpct\b|\bpercent\b/i],
];

/** `Bray P1 (ppm)` → `{ words: 'bray p1', unit: 'ppm' }`: lower case, signs to spaces, units taken off. */
export function squeeze(header: string): { words: string; unit: string | null } {
  let text = header
    .replace(/₂/g, '2')
    .replace(/₃/g, '3')
    .replace(/[\r\n_]+/g, ' ')
    .slice(0, 200);
  let unit: string | null = null;
  for (const [name, pattern] of UNITS) {
    if (!pattern.test(text)) continue;
    unit = name;
    text = text.replace(pattern, ' ');
    break;
  }
  const words = text
    .toLowerCase()
    .replace(/#/g, ' no ')
    .replace(/[^a-z0-9]+/g, ' ')
    .trim()
    .replace(/ (result|results|value|values)$/, '');
  return { words, unit };
}

const BUFFERS: readonly (readonly [BufferMethod, RegExp])[] = [
  ['Sikora', /sikora|\bsik/i],
  ['SMP', /\bsmp\b|shoemaker/i],
  ['Woodruff', /woodruff|wdrf|\bmwb\b/i],
  ['Adams-Evans', /adams|\ba\s?[&-]\s?e\b|\bae\b|\ba e\b/i],
  ['Mehlich', /mehlich|\bmeh/i],
];

/** The buffer a header, a choice or a laboratory's test name speaks of. */
export function bufferMethodOf(text: string): BufferMethod | null {
  return BUFFERS.find(([, pattern]) => pattern.test(text.replace(/_/g, ' ')))?.[0] ?? null;
}

const EXTRACTANTS: readonly (readonly [PhosphorusMethod, RegExp])[] = [
  ['Olsen', /olsen|bicarb/i],
  ['Mehlich 3', /mehlich|\bm-?3|m3/i],
  ['Bray P2', /bray\W*(p\W*)?(2|ii)\b|strong\W*bray|\bp-?2\b|\bb2\b/i],
  ['Bray P1', /bray|\bp-?1\b|\bb1\b/i],
];

/** The extractant a phosphorus header or test name speaks of. */
export function phosphorusMethodOf(text: string): PhosphorusMethod | null {
  return EXTRACTANTS.find(([, pattern]) => pattern.test(text.replace(/_/g, ' ')))?.[0] ?? null;
}

/** Measures of which a share of the exchange complex has the same letter: "Ca %" is no calcium in ppm. */
const SATURATED = new Set<Meaning>(['phosphorusPpm', 'potassiumPpm', 'calciumPpm', 'magnesiumPpm']);

export interface HeaderGuess {
  meaning: Meaning;
  unit: string | null;
  /** Lower is the better name for its meaning. */
  rank: number;
}

/** What a header means by the lexicon; `null` when it is not known. */
export function meaningOf(header: string): HeaderGuess | null {
  const { words, unit } = squeeze(header);
  if (!words) return null;
  // "SampleID" and "BufferPH" read like their spaced forms.
  const spaced = squeeze(header.replace(/([a-z])([A-Z])/g, '$1 $2')).words;
  for (const { meaning, names, patterns = [] } of KNOWN) {
    const named = names.findIndex((name) => name === words || name === spaced);
    const rank = named >= 0 ? named : patterns.some((pattern) => pattern.test(words)) ? names.length : -1;
    if (rank < 0) continue;
    if (unit === '%' && SATURATED.has(meaning)) return null;
    // "Mehlich (ppm)" is the extractant, not the buffer.
    if (meaning === 'bufferPh' && (unit === 'ppm' || unit === 'lb/ac')) continue;
    return { meaning, unit, rank };
  }
  return null;
}
