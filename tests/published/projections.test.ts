import { describe, expect, test } from 'vitest';
import { readBoundaries } from '@/features/fields/readers/read-boundaries';
import { zippedShapefile } from '../support/shapefiles';

/**
 * Coordinates of shapefiles against GDAL 3.6 (Debian gdal-bin): the projected corner below was turned into longitude and latitude by
 * `gdaltransform -s_srs FILE.prj -t_srs EPSG:4326`, with the .prj as `gdalsrsinfo -o wkt_esri` writes it. Tolerance 1e-7 degree.
 */
const CASES: { system: string; prj: string; x: number; y: number; longitude: number; latitude: number }[] = [
  {
    system: 'UTM zone 15, NAD 83',
    prj: 'PROJCS["NAD_1983_UTM_Zone_15N",GEOGCS["GCS_North_American_1983",DATUM["D_North_American_1983",SPHEROID["GRS_1980",6378137.0,298.257222101]],PRIMEM["Greenwich",0.0],UNIT["Degree",0.0174532925199433]],PROJECTION["Transverse_Mercator"],PARAMETER["False_Easting",500000.0],PARAMETER["False_Northing",0.0],PARAMETER["Central_Meridian",-93.0],PARAMETER["Scale_Factor",0.9996],PARAMETER["Latitude_Of_Origin",0.0],UNIT["Meter",1.0]]',
    x: 457063.997570213,
    y: 4564923.38169885,
    longitude: -93.5123456,
    latitude: 41.2345678,
  },
  {
    system: 'UTM zone 14, NAD 83',
    prj: 'PROJCS["NAD_1983_UTM_Zone_14N",GEOGCS["GCS_North_American_1983",DATUM["D_North_American_1983",SPHEROID["GRS_1980",6378137.0,298.257222101]],PRIMEM["Greenwich",0.0],UNIT["Degree",0.0174532925199433]],PROJECTION["Transverse_Mercator"],PARAMETER["False_Easting",500000.0],PARAMETER["False_Northing",0.0],PARAMETER["Central_Meridian",-99.0],PARAMETER["Scale_Factor",0.9996],PARAMETER["Latitude_Of_Origin",0.0],UNIT["Meter",1.0]]',
    x: 644716.159376546,
    y: 5195803.89566121,
    longitude: -97.1,
    latitude: 46.9,
  },
  {
    system: 'UTM zone 16, NAD 83',
    prj: 'PROJCS["NAD_1983_UTM_Zone_16N",GEOGCS["GCS_North_American_1983",DATUM["D_North_American_1983",SPHEROID["GRS_1980",6378137.0,298.257222101]],PRIMEM["Greenwich",0.0],UNIT["Degree",0.0174532925199433]],PROJECTION["Transverse_Mercator"],PARAMETER["False_Easting",500000.0],PARAMETER["False_Northing",0.0],PARAMETER["Central_Meridian",-87.0],PARAMETER["Scale_Factor",0.9996],PARAMETER["Latitude_Of_Origin",0.0],UNIT["Meter",1.0]]',
    x: 397716.648427742,
    y: 4439546.31816783,
    longitude: -88.2,
    latitude: 40.1,
  },
  {
    system: 'web Mercator',
    prj: 'PROJCS["WGS_1984_Web_Mercator_Auxiliary_Sphere",GEOGCS["GCS_WGS_1984",DATUM["D_WGS_1984",SPHEROID["WGS_1984",6378137.0,298.257223563]],PRIMEM["Greenwich",0.0],UNIT["Degree",0.0174532925199433]],PROJECTION["Mercator_Auxiliary_Sphere"],PARAMETER["False_Easting",0.0],PARAMETER["False_Northing",0.0],PARAMETER["Central_Meridian",0.0],PARAMETER["Standard_Parallel_1",0.0],PARAMETER["Auxiliary_Sphere_Type",0.0],UNIT["Meter",1.0]]',
    x: -10409746.6950766,
    y: 5047002.17000335,
    longitude: -93.5123455999998,
    latitude: 41.2345678,
  },
  {
    system: 'Albers equal area, lower 48 states',
    prj: 'PROJCS["NAD_1983_Contiguous_USA_Albers",GEOGCS["GCS_North_American_1983",DATUM["D_North_American_1983",SPHEROID["GRS_1980",6378137.0,298.257222101]],PRIMEM["Greenwich",0.0],UNIT["Degree",0.0174532925199433]],PROJECTION["Albers"],PARAMETER["False_Easting",0.0],PARAMETER["False_Northing",0.0],PARAMETER["Central_Meridian",-96.0],PARAMETER["Standard_Parallel_1",29.5],PARAMETER["Standard_Parallel_2",45.5],PARAMETER["Latitude_Of_Origin",23.0],UNIT["Meter",1.0]]',
    x: 206868.620457418,
    y: 2027961.50074957,
    longitude: -93.5123456,
    latitude: 41.2345678,
  },
  {
    system: 'State Plane Iowa North, metres',
    prj: 'PROJCS["NAD_1983_StatePlane_Iowa_North_FIPS_1401",GEOGCS["GCS_North_American_1983",DATUM["D_North_American_1983",SPHEROID["GRS_1980",6378137.0,298.257222101]],PRIMEM["Greenwich",0.0],UNIT["Degree",0.0174532925199433]],PROJECTION["Lambert_Conformal_Conic"],PARAMETER["False_Easting",1500000.0],PARAMETER["False_Northing",1000000.0],PARAMETER["Central_Meridian",-93.5],PARAMETER["Standard_Parallel_1",43.2666666666667],PARAMETER["Standard_Parallel_2",42.0666666666667],PARAMETER["Latitude_Of_Origin",41.5],UNIT["Meter",1.0]]',
    x: 1498964.72820957,
    y: 970514.977909678,
    longitude: -93.5123456,
    latitude: 41.2345678,
  },
  {
    system: 'State Plane Iowa North, US survey feet',
    prj: 'PROJCS["NAD_1983_StatePlane_Iowa_North_FIPS_1401_Feet",GEOGCS["GCS_North_American_1983",DATUM["D_North_American_1983",SPHEROID["GRS_1980",6378137.0,298.257222101]],PRIMEM["Greenwich",0.0],UNIT["Degree",0.0174532925199433]],PROJECTION["Lambert_Conformal_Conic"],PARAMETER["False_Easting",4921250.0],PARAMETER["False_Northing",3280833.3333],PARAMETER["Central_Meridian",-93.5],PARAMETER["Standard_Parallel_1",43.2666666666667],PARAMETER["Standard_Parallel_2",42.0666666666667],PARAMETER["Latitude_Of_Origin",41.5],UNIT["US survey foot",0.304800609601219]]',
    x: 4917853.4458009,
    y: 3184097.889992,
    longitude: -93.5123456,
    latitude: 41.2345678,
  },
  {
    system: 'State Plane Illinois East, US survey feet',
    prj: 'PROJCS["NAD_1983_StatePlane_Illinois_East_FIPS_1201_Feet",GEOGCS["GCS_North_American_1983",DATUM["D_North_American_1983",SPHEROID["GRS_1980",6378137.0,298.257222101]],PRIMEM["Greenwich",0.0],UNIT["Degree",0.0174532925199433]],PROJECTION["Transverse_Mercator"],PARAMETER["False_Easting",984250.0],PARAMETER["False_Northing",0.0],PARAMETER["Central_Meridian",-88.3333333333333],PARAMETER["Scale_Factor",0.999975],PARAMETER["Latitude_Of_Origin",36.6666666666667],UNIT["US survey foot",0.304800609601219]]',
    x: 1021549.59331367,
    y: 1250365.3311228,
    longitude: -88.2,
    latitude: 40.1,
  },
  {
    system: 'State Plane North Dakota North, international feet',
    prj: 'PROJCS["NAD_1983_StatePlane_North_Dakota_North_FIPS_3301_Feet_Intl",GEOGCS["GCS_North_American_1983",DATUM["D_North_American_1983",SPHEROID["GRS_1980",6378137.0,298.257222101]],PRIMEM["Greenwich",0.0],UNIT["Degree",0.0174532925199433]],PROJECTION["Lambert_Conformal_Conic"],PARAMETER["False_Easting",1968503.937],PARAMETER["False_Northing",0.0],PARAMETER["Central_Meridian",-100.5],PARAMETER["Standard_Parallel_1",48.7333333333333],PARAMETER["Standard_Parallel_2",47.4333333333333],PARAMETER["Latitude_Of_Origin",47.0],UNIT["foot",0.3048]]',
    x: 2818328.25743495,
    y: -17711.5766176052,
    longitude: -97.1,
    latitude: 46.9,
  },
  {
    system: 'State Plane Michigan South, international feet',
    prj: 'PROJCS["NAD_1983_StatePlane_Michigan_South_FIPS_2113_Feet_Intl",GEOGCS["GCS_North_American_1983",DATUM["D_North_American_1983",SPHEROID["GRS_1980",6378137.0,298.257222101]],PRIMEM["Greenwich",0.0],UNIT["Degree",0.0174532925199433]],PROJECTION["Lambert_Conformal_Conic"],PARAMETER["False_Easting",13123359.58],PARAMETER["False_Northing",0.0],PARAMETER["Central_Meridian",-84.3666666666667],PARAMETER["Standard_Parallel_1",43.6666666666667],PARAMETER["Standard_Parallel_2",42.1],PARAMETER["Latitude_Of_Origin",41.5],UNIT["foot",0.3048]]',
    x: 13207655.9955559,
    y: 656138.010403793,
    longitude: -84.05,
    latitude: 43.3,
  },
  {
    system: 'UTM zone 15, WGS 84',
    prj: 'PROJCS["WGS_1984_UTM_Zone_15N",GEOGCS["GCS_WGS_1984",DATUM["D_WGS_1984",SPHEROID["WGS_1984",6378137.0,298.257223563]],PRIMEM["Greenwich",0.0],UNIT["Degree",0.0174532925199433]],PROJECTION["Transverse_Mercator"],PARAMETER["False_Easting",500000.0],PARAMETER["False_Northing",0.0],PARAMETER["Central_Meridian",-93.0],PARAMETER["Scale_Factor",0.9996],PARAMETER["Latitude_Of_Origin",0.0],UNIT["Meter",1.0]]',
    x: 457063.99757052,
    y: 4564923.38181438,
    longitude: -93.5123456,
    latitude: 41.2345678,
  },
];

describe('shapefiles in the coordinate systems that fields come in', () => {
  test.each(CASES)('$system agrees with GDAL to 1e-7 degree', async ({ prj, x, y, longitude, latitude }) => {
    const side = prj.includes('foot') ? 1300 : 400;
    const square = [
      [x, y],
      [x, y + side],
      [x + side, y + side],
      [x + side, y],
      [x, y],
    ];
    // Written as it stands: the corners are in the file's own system already.
    const file = zippedShapefile(
      [{ geometry: { type: 'Polygon', coordinates: [[...square].reverse()] }, attributes: { FIELD: 'One' } }],
      null,
      prj,
    );
    const outcome = await readBoundaries([{ name: 'field.zip', bytes: file }]);
    expect(outcome.ok && outcome.value.unknownCrs).toBeNull();
    const ring = outcome.ok ? (outcome.value.features[0]?.geometry?.coordinates[0] as number[][]) : [];
    const nearest = ring.reduce(
      (best, point) =>
        Math.min(best, Math.max(Math.abs((point[0] as number) - longitude), Math.abs((point[1] as number) - latitude))),
      1,
    );
    expect(nearest).toBeLessThan(1e-7);
  });

  test('none of the systems was dropped', () => {
    expect(CASES).toHaveLength(11);
  });
});
