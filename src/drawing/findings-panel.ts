import type { Result } from '../domain/result.ts';
import { count } from '../domain/verdict.ts';
import { numberedDisc } from './draw-marks.ts';
import { PALETTE } from './palette.ts';
import type { Rectangle } from './placed-view.ts';
import type { Scene, SceneMark } from './scene.ts';
import { element, text } from './svg.ts';
import { fitted, plain, wrappedText } from './text.ts';

const SIZE = 2.5;
const LINE = 3.3;
const LINES = 3;

/** A finding as the panel tells it, and where. */
interface Entry {
  readonly mark: SceneMark;
  readonly lines: readonly string[];
  readonly y: number;
}

/** The findings that are marked in the views, by number, as many as fit. `listed` says which those are. */
export class FindingsPanel {
  private readonly area: Rectangle;
  private readonly entries: readonly Entry[];

  constructor(scene: Scene, area: Rectangle) {
    this.area = area;
    this.entries = entriesIn(scene, area);
  }

  get listed(): ReadonlySet<number> {
    return new Set(this.entries.map(({ mark }) => mark.number));
  }

  draw(result: Result): string {
    const { x, y, height } = this.area;
    const width = widthIn(this.area);
    const head = { x, y: y + 4, 'font-size': 3.5, 'font-weight': 'bold', fill: PALETTE.ink };
    const rest = result.findings.length - this.entries.length;
    return element('g', { class: 'findings' }, [
      text('Findings', head),
      ...this.entries.map((entry) => drawEntry(entry, x, width)),
      ...(rest > 0
        ? [
            text(`and ${count(rest, 'more finding')} in the other outputs`, {
              x,
              y: Math.min(y + height - 4, (this.entries.at(-1)?.y ?? y + 8) + SIZE * 7),
              'font-size': SIZE,
              fill: PALETTE.quiet,
            }),
          ]
        : []),
    ]);
  }
}

const widthIn = ({ width }: Rectangle): number => width - 6;

function entriesIn(scene: Scene, area: Rectangle): Entry[] {
  const bottom = area.y + area.height - 8;
  const entries: Entry[] = [];
  let y = area.y + 10;
  for (const mark of scene.marks) {
    const lines = wrappedText(plain(mark.finding.message), SIZE, widthIn(area), LINES);
    const height = (lines.length + 1) * LINE + 1.6;
    if (y + height > bottom) break;
    entries.push({ mark, lines, y });
    y += height;
  }
  return entries;
}

function drawEntry({ mark: { number, finding }, lines, y }: Entry, x: number, width: number): string {
  const head = [finding.code, plain(finding.place ?? '')].filter((word) => word !== '').join(', ');
  const look = { x: x + 6, 'font-size': SIZE, fill: PALETTE.ink };
  return element('g', { 'data-listed': number }, [
    numberedDisc(number, finding.severity === 'error', [x + 1.9, y]),
    text(fitted(head, SIZE, width, true), { ...look, y: y + 0.9, 'font-weight': 'bold' }),
    ...lines.map((line, k) => text(line, { ...look, y: y + 0.9 + (k + 1) * LINE })),
  ]);
}
