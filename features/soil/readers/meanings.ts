/** What a column of a soil test can mean, what people call it, and what its values can be. Pure data. */

export type Meaning =
  | 'id'
  | 'labNumber'
  | 'fieldName'
  | 'laboratory'
  | 'sampledOn'
  | 'depth'
  | 'depthFrom'
  | 'depthTo'
  | 'latitude'
  | 'longitude'
  | 'place'
  | Measure;

export type Measure =
  | 'ph'
  | 'saltPh'
  | 'bufferPh'
  | 'organicMatterPercent'
  | 'cec'
  | 'phosphorusPpm'
  | 'potassiumPpm'
  | 'calciumPpm'
  | 'magnesiumPpm'
  | 'carbonatePercent'
  | 'electricalConductivity'
  | 'cystEggsPer100cc';

export type PhosphorusMethod = 'Bray P1' | 'Bray P2' | 'Mehlich 3' | 'Olsen';

/** What a person calls each meaning; the order of the choices on the matching page. */
export const MEANING_LABELS: Record<Meaning, string> = {
  id: 'Sample number',
  labNumber: 'Laboratory’s own number',
  fieldName: 'Field name',
  laboratory: 'Laboratory',
  sampledOn: 'Date sampled',
  depth: 'Depth',
  depthFrom: 'Depth, top',
  depthTo: 'Depth, bottom',
  latitude: 'Latitude',
  longitude: 'Longitude',
  place: 'Latitude and longitude together',
  ph: 'pH (water)',
  saltPh: 'pH (salt or CaCl₂)',
  bufferPh: 'Buffer pH or lime index',
  organicMatterPercent: 'Organic matter, %',
  cec: 'CEC, meq/100 g',
  phosphorusPpm: 'Phosphorus, ppm',
  potassiumPpm: 'Potassium, ppm',
  calciumPpm: 'Calcium, ppm',
  magnesiumPpm: 'Magnesium, ppm',
  carbonatePercent: 'Carbonate (CCE), %',
  electricalConductivity: 'Conductivity, dS/m',
  cystEggsPer100cc: 'Cyst eggs per 100 cc',
};

/** What each measure can be; outside it the row is left out and named. */
export const RANGES: Record<Measure | 'latitude' | 'longitude', { low: number; high: number; name: string }> = {
  ph: { low: 3, high: 10.5, name: 'pH' },
  saltPh: { low: 2.5, high: 10, name: 'salt pH' },
  bufferPh: { low: 4, high: 8.5, name: 'buffer pH' },
  organicMatterPercent: { low: 0, high: 100, name: 'organic matter' },
  cec: { low: 0, high: 200, name: 'CEC' },
  phosphorusPpm: { low: 0, high: 3000, name: 'phosphorus' },
  potassiumPpm: { low: 0, high: 10_000, name: 'potassium' },
  calciumPpm: { low: 0, high: 100_000, name: 'calcium' },
  magnesiumPpm: { low: 0, high: 20_000, name: 'magnesium' },
  carbonatePercent: { low: 0, high: 100, name: 'carbonate' },
  electricalConductivity: { low: 0, high: 60, name: 'conductivity' },
  cystEggsPer100cc: { low: 0, high: 1_000_000, name: 'cyst eggs' },
  latitude: { low: -90, high: 90, name: 'latitude' },
  longitude: { low: -180, high: 180, name: 'longitude' },
};
