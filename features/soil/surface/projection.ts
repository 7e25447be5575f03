/** Degrees to metres on a plane that touches the ellipsoid at a centre: within a field, right to a few parts in a million. */
const SEMI_MAJOR_METERS = 6378137; // WGS 84
const ECCENTRICITY_SQUARED = 0.00669437999014;

export interface LocalProjection {
  longitude: number;
  latitude: number;
  metersPerDegreeEast: number;
  metersPerDegreeNorth: number;
}

/** The projection about a centre, from the ellipsoid's radii of curvature there. */
export function localProjection(longitude: number, latitude: number): LocalProjection {
  const phi = (latitude * Math.PI) / 180;
  const w = 1 - ECCENTRICITY_SQUARED * Math.sin(phi) ** 2;
  const primeVertical = SEMI_MAJOR_METERS / Math.sqrt(w);
  const meridian = (SEMI_MAJOR_METERS * (1 - ECCENTRICITY_SQUARED)) / w ** 1.5;
  return {
    longitude,
    latitude,
    metersPerDegreeEast: (primeVertical * Math.cos(phi) * Math.PI) / 180,
    metersPerDegreeNorth: (meridian * Math.PI) / 180,
  };
}

export function eastMeters(projection: LocalProjection, longitude: number): number {
  return (longitude - projection.longitude) * projection.metersPerDegreeEast;
}

export function northMeters(projection: LocalProjection, latitude: number): number {
  return (latitude - projection.latitude) * projection.metersPerDegreeNorth;
}
