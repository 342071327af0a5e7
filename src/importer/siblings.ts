import { pushTo } from '../domain/group.ts';
import type { Section } from '../domain/member.ts';
import { readBody } from './geometry/body.ts';
import { NotRead } from './not-read.ts';
import type { Reading } from './reading.ts';
import type { Relations } from './relations.ts';
import { readShape } from './representations.ts';
import type { SectionBook } from './sections/section-book.ts';
import { IDENTITY } from './transform.ts';

/** So many of a type are looked at until one shows its section. */
const MOST_TRIED = 8;

/** The sections that the bodies of one type's elements show, for the one among them that is too short to show its own. */
export class SiblingSections {
  private readonly reading: Reading;
  private readonly relations: Relations;
  private readonly sections: SectionBook;
  private readonly byType = new Map<number, Section | null>();
  private elementsOf: ReadonlyMap<number, readonly number[]> | null = null;

  constructor(reading: Reading, relations: Relations, sections: SectionBook) {
    this.reading = reading;
    this.relations = relations;
    this.sections = sections;
  }

  /** The section measured on another element of the same type; null where there is none. */
  of(element: number): Section | null {
    const type = this.relations.typeOf.get(element);
    if (type === undefined) return null;
    let section = this.byType.get(type);
    if (section === undefined) {
      section = this.measuredOf(type);
      this.byType.set(type, section);
    }
    return section;
  }

  private measuredOf(type: number): Section | null {
    this.elementsOf ??= byType(this.relations);
    for (const element of (this.elementsOf.get(type) ?? []).slice(0, MOST_TRIED)) {
      const section = this.shownBy(element);
      if (section !== null) return section;
    }
    return null;
  }

  private shownBy(element: number): Section | null {
    const { body } = readShape(this.reading, this.reading.file.refAt(element, 6));
    try {
      const [axis, ...others] = readBody(this.reading, this.sections, body, IDENTITY);
      const isOne = axis !== undefined && others.length === 0 && !axis.isRun && axis.rise === 0;
      return isOne ? (axis.measured?.section ?? null) : null;
    } catch (problem) {
      if (problem instanceof NotRead) return null;
      throw problem;
    }
  }
}

function byType({ typeOf }: Relations): Map<number, number[]> {
  const elements = new Map<number, number[]>();
  for (const element of typeOf.keys()) pushTo(elements, typeOf.get(element)!, element);
  return elements;
}
