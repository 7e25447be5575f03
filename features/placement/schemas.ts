import type { Polygon } from 'geojson';
import { z } from 'zod';

export const scoreSchema = z.object({ operationId: z.string().min(1), season: z.number().int() });

const relativeMaturity = (what: string) =>
  z.coerce.number(`${what} is a number like 2.4.`).min(-2, `${what} is −2 or more.`).max(9, `${what} is 9 or less.`);

const zoneFields = {
  name: z.string().trim().min(1, 'Give the zone a name.').max(80, 'Keep the name under 80 letters.'),
  relativeMaturityFrom: relativeMaturity('RM from'),
  relativeMaturityTo: relativeMaturity('RM to'),
};

const inOrder = (zone: { relativeMaturityFrom: number; relativeMaturityTo: number }) =>
  zone.relativeMaturityTo >= zone.relativeMaturityFrom;
const ORDER_WORDS = { message: 'RM to must not be below RM from.', path: ['relativeMaturityTo'] };

const position = z.tuple([z.number().min(-180).max(180), z.number().min(-90).max(90)]);

/** An outline as the drawing on the map hands it over. */
const polygonSchema: z.ZodType<Polygon> = z.object({
  type: z.literal('Polygon'),
  coordinates: z.array(z.array(position).min(4, 'An outline has at least three corners.').max(5000)).min(1).max(50),
});

/** A zone drawn on the map, or said as a box of latitudes and longitudes. */
export const addZoneSchema = z.object({ ...zoneFields, geometry: polygonSchema }).refine(inOrder, ORDER_WORDS);
export const changeZoneSchema = z.object({ zoneId: z.string().min(1), ...zoneFields }).refine(inOrder, ORDER_WORDS);
export const zoneIdSchema = z.object({ zoneId: z.string().min(1) });

/** Which shapes of an uploaded file become zones. */
export const keepZonesSchema = z.object({
  uploadId: z.string().min(1),
  shapes: z
    .array(z.object({ index: z.number().int().min(0), ...zoneFields }).refine(inOrder, ORDER_WORDS))
    .min(1, 'Choose at least one shape.')
    .max(200, 'At most 200 zones at a time.'),
});

/** Coefficients by name; `null` sets one back to its usual value. */
export const setRulesSchema = z.object({ values: z.record(z.string(), z.number().nullable()) });

export const stationIdSchema = z.object({ stationId: z.string().min(1) });
