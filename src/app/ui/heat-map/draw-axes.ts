import { axisBottom, axisLeft, select, type Axis, type NumberValue } from 'd3';
import type { AxisText } from './map-grid';
import { xTickCount, yTickCount, type MapFrame, type MapScales } from './map-frame';
import { tickText } from './tick-text';

interface AxisGroups {
  readonly x: SVGGElement;
  readonly y: SVGGElement;
}

export function drawAxes(groups: AxisGroups, { x, y }: MapScales, frame: MapFrame): void {
  const [xCount, yCount] = [xTickCount(frame.plotWidth), yTickCount(frame.plotHeight)];
  const [xFormat, yFormat] = [x.tickFormat(xCount), y.tickFormat(yCount)];
  const bottom = axisBottom(x).ticks(xCount);
  const left = axisLeft(y).ticks(yCount);
  draw(
    groups.x,
    bottom.tickFormat((value) => tickText(xFormat(value))),
  );
  draw(
    groups.y,
    left.tickFormat((value) => tickText(yFormat(value))),
  );
}

export function clearAxes(groups: AxisGroups): void {
  groups.x.replaceChildren();
  groups.y.replaceChildren();
}

/** "payload, kg" */
export function axisTitle({ label, unit }: AxisText): string {
  return unit === '' ? label : `${label}, ${unit}`;
}

function draw(element: SVGGElement, axis: Axis<NumberValue>): void {
  const group = select(element);
  group.call(axis.tickSizeOuter(0).tickPadding(5));
  // The axis package sets a font of its own on its group.
  group.attr('font-family', null).attr('font-size', null);
}
