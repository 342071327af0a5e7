import { norm } from '../../domain/vector.ts';
import { asRef, asString } from '../../step/values.ts';
import { isSound } from '../member-axis.ts';
import { NotRead, noAxis } from '../not-read.ts';
import type { Sources } from '../read-element.ts';
import { readShape } from '../representations.ts';
import { compose, type Transform } from '../transform.ts';
import { type Block, cornersOf, isSquare, squareAxes, tightestBox } from './block.ts';
import { BodyBlocks } from './body-blocks.ts';
import { globalIdOf } from './global-id.ts';
import type { Assembly, Plate, UnreadPlate } from './types.ts';

/** Reinforcement, signs and dampers are components too, but fasten no steel members to one another. */
const CLASSES = [
  'IfcPlate',
  'IfcPlateStandardCase',
  'IfcDiscreteAccessory',
  'IfcMechanicalFastener',
  'IfcFastener',
  'IfcBuildingElementPart',
  'IfcElementComponent',
] as const;

/** Of an element with many solids this many are tried for the directions of the box round all. */
const SOLIDS_TRIED = 6;

type PlateSources = Pick<Sources, 'reading' | 'placements' | 'sections'>;

export function readPlates(
  { reading, placements, sections }: PlateSources,
  assemblies: ReadonlyMap<string, Assembly>,
): { plates: Plate[]; unread: UnreadPlate[] } {
  const { file } = reading;
  const bodies = new BodyBlocks(reading, sections);
  const plates: Plate[] = [];
  const unread: UnreadPlate[] = [];
  for (const written of CLASSES) {
    for (const id of file.idsOf(written.toUpperCase())) {
      const globalId = globalIdOf(file, id);
      const args = file.args(id);
      reading.about(globalId);
      try {
        const world = placements.worldOf(asRef(args[5]));
        const box = boxOfElement(bodies.of(readShape(reading, asRef(args[6])).body), world);
        const assembly = assemblies.get(globalId)?.globalId ?? null;
        plates.push({ globalId, name: asString(args[2]), class: written, ...box, assembly });
      } catch (problem) {
        if (!(problem instanceof NotRead)) throw problem;
        unread.push({ globalId, reason: problem.message });
      } finally {
        reading.about(null);
      }
    }
  }
  return { plates, unread };
}

type OrientedBox = Pick<Plate, 'centre' | 'axes' | 'halfSizes'>;

/** Along the solid's own axes; round several solids, along those of the element or of one of them, whichever is closer. */
function boxOfElement(blocks: readonly Block[], world: Transform): OrientedBox {
  const placed = blocks.map((block) => compose(world, block));
  const [only] = placed;
  if (only !== undefined && placed.length === 1 && isSquare(only)) return soundBox(only);
  const own = placed.slice(0, SOLIDS_TRIED).map(squareAxes);
  const candidates = (placed.length === 1 ? own : [squareAxes(world), ...own]).filter((axes) => axes !== null);
  if (candidates.length === 0) throw noAxis('its body has no size');
  return soundBox(tightestBox(placed.flatMap(cornersOf), candidates));
}

function soundBox(box: Block): OrientedBox {
  const axes = squareAxes(box);
  if (axes === null) throw noAxis('its body has no size');
  const halfSizes = [norm(box.x), norm(box.y), norm(box.z)] as const;
  if (!isSound(box.origin) || !isSound(halfSizes)) throw noAxis('its body has a coordinate that is no number');
  return { centre: box.origin, axes, halfSizes };
}
