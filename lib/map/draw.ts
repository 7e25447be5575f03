import type { Polygon } from 'geojson';
import type * as maplibre from 'maplibre-gl';
import { MAP_COLORS } from './style';

/**
 * Lets a person draw one outline on the map: click for each corner, click the first one again (or Enter) to finish, Escape to start
 * over. Answers what stops it. The drawing library is only loaded when somebody draws.
 */
export function startDrawing(map: maplibre.Map, onFinish: (outline: Polygon) => void): () => void {
  let stopped = false;
  let stop: () => void = () => undefined;
  void (async () => {
    const [{ TerraDraw, TerraDrawPolygonMode }, { TerraDrawMapLibreGLAdapter }] = await Promise.all([
      import('terra-draw'),
      import('terra-draw-maplibre-gl-adapter'),
    ]);
    if (stopped) return;
    const draw = new TerraDraw({
      adapter: new TerraDrawMapLibreGLAdapter({ map }),
      modes: [
        new TerraDrawPolygonMode({
          styles: {
            fillColor: MAP_COLORS.bloom,
            fillOpacity: 0.15,
            outlineColor: MAP_COLORS.bloom,
            outlineWidth: 3,
            closingPointColor: MAP_COLORS.bloom,
            closingPointWidth: 6,
          },
        }),
      ],
    });
    draw.start();
    draw.setMode('polygon');
    draw.on('finish', (id) => {
      const feature = draw.getSnapshot().find((one) => one.id === id);
      if (feature?.geometry.type === 'Polygon') onFinish(feature.geometry as Polygon);
    });
    stop = () => {
      // The map may be gone already when its page is left.
      if (map.getStyle()) draw.stop();
    };
  })();
  return () => {
    stopped = true;
    try {
      stop();
    } catch {
      // A map that was removed has nothing left to clean.
    }
  };
}
