import { environment } from '@/lib/env';
import type { TileLayer } from './style';

/** The street or imagery layer, when an address is configured; `null` otherwise, and maps draw without it. */
export function configuredTiles(): TileLayer | null {
  const { HILUM_TILE_URL: url, HILUM_TILE_CREDIT: credit } = environment();
  return url ? { url, credit } : null;
}
