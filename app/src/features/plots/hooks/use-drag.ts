import { useState, type PointerEvent } from 'react';

/** A rectangle that is being dragged, pixels from the upper left of the element. */
export interface DragBox {
  x1: number;
  y1: number;
  x2: number;
  y2: number;
}

/** Shorter drags are clicks. */
const LEAST = 5;

/** Drags a rectangle over an element. @param onEnd told the rectangle, or null after a click */
export function useDrag(onEnd: (box: DragBox | null) => void) {
  const [box, setBox] = useState<DragBox | null>(null);
  const place = (event: PointerEvent) => {
    const { left, top } = event.currentTarget.getBoundingClientRect();
    return [event.clientX - left, event.clientY - top] as const;
  };
  return {
    box,
    handlers: {
      onPointerDown: (event: PointerEvent) => {
        if (event.button !== 0) return;
        event.currentTarget.setPointerCapture(event.pointerId);
        const [x, y] = place(event);
        setBox({ x1: x, y1: y, x2: x, y2: y });
      },
      onPointerMove: (event: PointerEvent) => {
        if (!box) return;
        const [x2, y2] = place(event);
        setBox({ ...box, x2, y2 });
      },
      onPointerUp: () => {
        if (!box) return;
        const far = Math.max(Math.abs(box.x2 - box.x1), Math.abs(box.y2 - box.y1));
        onEnd(far < LEAST ? null : box);
        setBox(null);
      },
      onPointerCancel: () => setBox(null),
    },
  };
}
