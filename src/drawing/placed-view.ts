import type { Flat } from './projection.ts';
import { type FlatView, heightOf, widthOf } from './view.ts';

/** A rectangle on paper, mm from the upper left corner of the sheet. */
export interface Rectangle {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** A view with its place on paper. */
export interface PlacedView {
  readonly flat: FlatView;
  readonly room: Rectangle;
  /** The room with what belongs round the view: bubbles, supports and title. */
  readonly cell: Rectangle;
  /** mm of paper for a metre of steel. */
  readonly scale: number;
  /** 1 : n; null where the drawing is fitted and not to scale. */
  readonly named: number | null;
  readonly onPaper: (point: Flat) => Flat;
}

/** The view in the middle of its room. */
export function placeView(
  flat: FlatView,
  room: Rectangle,
  cell: Rectangle,
  scale: number,
  named: number | null,
): PlacedView {
  const { low, high } = flat.box;
  const left = room.x + (room.width - widthOf(flat.box) * scale) / 2;
  const top = room.y + (room.height - heightOf(flat.box) * scale) / 2;
  return {
    flat,
    room,
    cell,
    scale,
    named,
    onPaper: ([x, y]) => [left + (x - low[0]) * scale, top + (high[1] - y) * scale],
  };
}
