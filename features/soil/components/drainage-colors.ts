import type { DrainageClass } from '@/features/placement/engine/model';

/** From dry to wet, straw to slate; the word stands beside the colour everywhere. */
export const DRAINAGE_COLORS: Record<DrainageClass, string> = {
  excessively: '#d9a441',
  'somewhat excessively': '#e2bd6f',
  well: '#e8d6a6',
  'moderately well': '#cfd8b4',
  'somewhat poorly': '#a9c3b8',
  poorly: '#8aa3bf',
  'very poorly': '#6b7fae',
};
export const NO_DRAINAGE_COLOR = '#d9cfb9';
