import { useEffect, useRef, useState } from 'react';
import { defaults as defaultInteractions } from 'ol/interaction/defaults.js';
import OlMap from 'ol/Map.js';
import Projection from 'ol/proj/Projection.js';
import View from 'ol/View.js';
import 'ol/ol.css';

/** Half width of the plane, arcsec: 30 degrees, wider than any neighbour circle that is drawn. */
const REACH = 108_000;

/** A flat plane in arcsec. Its units are called pixels so that nothing of the Earth is applied to it. */
const PLANE = new Projection({
  code: 'tangent-plane',
  units: 'pixels',
  extent: [-REACH, -REACH, REACH, REACH],
  global: false,
});

/**
 * Owns one OpenLayers map over the tangent plane: React never renders inside its element, and it dies with it.
 * Returns the ref for the element and, once mounted, the map.
 */
export function useSkyMap() {
  const target = useRef<HTMLDivElement>(null);
  const [map, setMap] = useState<OlMap>();
  useEffect(() => {
    const created = new OlMap({
      target: target.current!,
      controls: [],
      interactions: defaultInteractions({ altShiftDragRotate: false, pinchRotate: false, onFocusOnly: false }),
      view: new View({
        projection: PLANE,
        center: [0, 0],
        resolution: 1,
        minResolution: 0.02,
        maxResolution: 120,
        constrainResolution: false,
        enableRotation: false,
        smoothExtentConstraint: false,
      }),
    });
    setMap(created);
    return () => {
      created.setTarget(undefined);
      created.dispose();
      setMap(undefined);
    };
  }, []);
  return { target, map };
}
