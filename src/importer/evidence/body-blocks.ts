import { asEnum, asRef } from '../../step/values.ts';
import { readFaces } from '../geometry/face-sets.ts';
import { mappedItems } from '../geometry/mapped-item.ts';
import { NotRead, noAxis } from '../not-read.ts';
import type { Reading } from '../reading.ts';
import type { SectionBook } from '../sections/section-book.ts';
import { compose, IDENTITY } from '../transform.ts';
import { inWords } from '../words.ts';
import type { Block } from './block.ts';
import { meshBlock } from './mesh-block.ts';
import { cylinderBlock, extrusionBlock, OutlineBoxes, revolutionBlock, sweptDiskBlock } from './swept-blocks.ts';

const DEEPEST = 64;

/** The boxes round the solids of bodies. An item is read once however many elements show it: a model has few kinds of bolt. */
export class BodyBlocks {
  private readonly reading: Reading;
  private readonly outlines: OutlineBoxes;
  private readonly known = new Map<number, readonly Block[] | NotRead>();

  constructor(reading: Reading, sections: SectionBook) {
    this.reading = reading;
    this.outlines = new OutlineBoxes(sections);
  }

  /**
   * One block for each solid in `items`, in their own coordinates, metres. Items that give none are passed over where
   * another gives one.
   * @throws NotRead where no item gives one.
   */
  of(items: readonly number[], depth = 0): Block[] {
    const blocks: Block[] = [];
    let refusal: NotRead | null = null;
    for (const item of items) {
      const found = this.ofItem(item, depth);
      if (found instanceof NotRead) refusal ??= found;
      else blocks.push(...found);
    }
    if (blocks.length === 0) throw refusal ?? noAxis('it has no shape');
    return blocks;
  }

  private ofItem(id: number, depth: number): readonly Block[] | NotRead {
    let found = this.known.get(id);
    if (found === undefined) {
      try {
        found = this.read(id, depth);
      } catch (problem) {
        if (!(problem instanceof NotRead)) throw problem;
        found = problem;
      }
      this.known.set(id, found);
    }
    return found;
  }

  private read(id: number, depth: number): Block[] {
    const { reading, outlines } = this;
    if (depth > DEEPEST) throw noAxis('its body refers to itself');
    const type = reading.typeOf(id);
    switch (type) {
      case 'IFCEXTRUDEDAREASOLID':
      case 'IFCEXTRUDEDAREASOLIDTAPERED':
        return [extrusionBlock(reading, outlines, id)];
      case 'IFCSWEPTDISKSOLID':
      case 'IFCSWEPTDISKSOLIDPOLYGONAL':
        return [sweptDiskBlock(reading, id)];
      case 'IFCREVOLVEDAREASOLID':
        return [revolutionBlock(reading, outlines, id)];
      case 'IFCRIGHTCIRCULARCYLINDER':
        return [cylinderBlock(reading, id)];
      case 'IFCMAPPEDITEM': {
        const { items, transform } = mappedItems(reading, id);
        return this.of(items, depth + 1).map((block) => compose(transform, block));
      }
      case 'IFCBOOLEANRESULT':
      case 'IFCBOOLEANCLIPPINGRESULT': {
        // What is cut off a plate is its corners and holes: the whole stock bounds it.
        const [operator, first, second] = reading.args(id);
        const operands = asEnum(operator) === 'UNION' ? [asRef(first), asRef(second)] : [asRef(first)];
        return this.of(
          operands.filter((operand) => operand !== null),
          depth + 1,
        );
      }
      case 'IFCCSGSOLID': {
        const root = asRef(reading.args(id)[0]);
        return this.of(root === null ? [] : [root], depth + 1);
      }
      default: {
        const faces = type === '' ? null : readFaces(reading, id, IDENTITY);
        if (faces === null)
          throw noAxis(type === '' ? 'the body it refers to is missing' : `its body is ${inWords(type)}`);
        const block = meshBlock(faces);
        if (block === null) throw noAxis('its mesh has no faces');
        return [block];
      }
    }
  }
}
