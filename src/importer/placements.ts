import { asRef, type StepValue } from '../step/values.ts';
import { gridsByAxis, readGridPlacement } from './grid-placement.ts';
import type { Grid } from './grids.ts';
import { readLinearAxes } from './linear-placement.ts';
import { NotRead, noAxis } from './not-read.ts';
import { axesOf, readAxes } from './placement-axes.ts';
import type { Reading } from './reading.ts';
import { compose, IDENTITY, type Transform } from './transform.ts';

/** One link of a placement chain. */
interface Link {
  readonly relative: Transform;
  readonly parent: number | null;
}

/** Object placements in world coordinates, each chain walked once. */
export class Placements {
  private readonly reading: Reading;
  private readonly root: Transform;
  private readonly world = new Map<number, Transform | NotRead>();
  private readonly gridOf: ReadonlyMap<number, Grid>;

  constructor(reading: Reading, grids: readonly Grid[]) {
    this.reading = reading;
    this.root = worldCoordinateSystem(reading);
    this.gridOf = gridsByAxis(grids);
  }

  /**
   * From the coordinates placed by `id` to the world's; without a placement, the project's own coordinate system.
   * @throws NotRead where the chain runs in a circle or is of a kind that is not read.
   */
  worldOf(id: number | null): Transform {
    if (id === null) return this.root;
    const own = this.world.get(id);
    if (own !== undefined) return orThrow(own);
    const parent = this.reading.file.typeOf(id) === 'IFCLOCALPLACEMENT' ? this.reading.file.refAt(id, 0) : null;
    const base = parent === null ? undefined : this.world.get(parent);
    // Most placements are one element's alone: they are not worth keeping once what they stand on is known.
    if (base !== undefined && !(base instanceof NotRead))
      return compose(base, axesOf(this.reading, this.reading.file.refAt(id, 1)));
    return this.walk(id);
  }

  /** The same of a placement that was walked before; null of any other. */
  known(id: number): Transform | null {
    const found = this.world.get(id);
    return found === undefined || found instanceof NotRead ? null : found;
  }

  private walk(id: number): Transform {
    // Walked in a loop and not by recursion: files hold chains of many thousand links.
    const chain: { id: number; relative: Transform }[] = [];
    const onWay = new Set<number>();
    let at: number | null = id;
    let base: Transform | NotRead = this.root;
    while (at !== null) {
      const known = this.world.get(at);
      if (known !== undefined) {
        base = known;
        break;
      }
      if (onWay.has(at)) {
        base = circle(at);
        break;
      }
      onWay.add(at);
      const link = this.link(at);
      if (link instanceof NotRead) {
        this.world.set(at, link);
        base = link;
        break;
      }
      chain.push({ id: at, relative: link.relative });
      at = link.parent;
    }
    for (const link of chain.reverse()) {
      base = base instanceof NotRead ? base : compose(base, link.relative);
      this.world.set(link.id, base);
    }
    return orThrow(base);
  }

  private link(id: number): Link | NotRead {
    const { reading } = this;
    const args = reading.args(id);
    const type = reading.typeOf(id);
    if (type === 'IFCLOCALPLACEMENT') return { relative: readAxes(reading, args[1]), parent: asRef(args[0]) };
    if (type === 'IFCGRIDPLACEMENT') {
      return orRefusal(() => {
        const { grid, relative } = readGridPlacement(reading, args, this.gridOf);
        return { relative, parent: grid.placement };
      });
    }
    if (type === 'IFCLINEARPLACEMENT') return this.linearLink(args);
    // What a missing parent would have moved is not known; the rest of the chain still holds.
    if (type === '') return { relative: IDENTITY, parent: null };
    return new NotRead(
      'unreadable-element',
      `its placement is of the class ${type}, which is not read`,
      'Export the model with local placements.',
    );
  }

  /** By the curve it lies along; where that is not read, by the position that the file gives beside it. */
  private linearLink(args: readonly StepValue[]): Link | NotRead {
    const { reading } = this;
    const parent = asRef(args[0]);
    const along = asRef(args[1]);
    const read = orRefusal(() => {
      if (along === null) throw noAxis('it is placed along no curve');
      return { relative: readLinearAxes(reading, along), parent };
    });
    if (!(read instanceof NotRead)) return read;
    if (asRef(args[2]) !== null) return { relative: readAxes(reading, args[2]), parent };
    return new NotRead(
      'unreadable-element',
      `its placement along a curve cannot be read: ${read.message}`,
      'Export the model with local placements.',
    );
  }
}

function orThrow(found: Transform | NotRead): Transform {
  if (found instanceof NotRead) throw found;
  return found;
}

function orRefusal(read: () => Link): Link | NotRead {
  try {
    return read();
  } catch (problem) {
    if (problem instanceof NotRead) return problem;
    throw problem;
  }
}

const circle = (id: number) =>
  new NotRead(
    'cyclic-placement',
    `its placement leads back to itself at #${id}`,
    'Export the model again; placed by hand, let each element be placed relative to its storey only.',
  );

/** Of the project's spatial context: the first one of type Model, else the first of three dimensions. */
function worldCoordinateSystem(reading: Reading): Transform {
  const contexts = reading.file
    .idsOf('IFCGEOMETRICREPRESENTATIONCONTEXT')
    .map((id) => reading.args(id))
    .filter((args) => args[2] === 3);
  const model = contexts.find((args) => typeof args[1] === 'string' && args[1].toUpperCase() === 'MODEL');
  const chosen = model ?? contexts[0];
  return chosen === undefined ? IDENTITY : readAxes(reading, chosen[4]);
}
