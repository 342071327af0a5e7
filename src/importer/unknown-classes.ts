import { nearestWord } from '../domain/nearest-word.ts';
import type { StepFile } from '../step/step-file.ts';
import { PRODUCT_CLASSES } from './product-classes.ts';
import type { Reading } from './reading.ts';

const KNOWN: ReadonlySet<string> = new Set(PRODUCT_CLASSES.map((name) => name.toUpperCase()));

/** Elements of classes that no schema has, such as a misspelt IFCMEMBR: they would vanish without a word. */
export function noteUnknownClasses(reading: Reading): void {
  const { file } = reading;
  for (const type of file.types()) {
    // One look tells for all of a class: most are points and directions, hundreds of thousands of them.
    const first = KNOWN.has(type) ? null : file.firstOf(type);
    if (first === null || !isElement(file, first)) continue;
    for (const id of file.idsOf(type)) {
      const globalId = file.stringAt(id, 0)?.trim() ?? '';
      reading.about(globalId === '' ? `#${id}` : globalId);
      reading.note(unknownClass(type));
    }
    reading.about(null);
  }
}

/** As every IfcProduct has: a GlobalId, and a placement or a representation at their places. */
function isElement(file: StepFile, id: number): boolean {
  if (file.stringAt(id, 0) === null) return false;
  const [placement, shape] = [5, 6].map((index) => file.refAt(id, index));
  return (
    (placement != null && file.typeOf(placement).endsWith('PLACEMENT')) ||
    (shape != null && file.typeOf(shape) === 'IFCPRODUCTDEFINITIONSHAPE')
  );
}

const unknownClass = (type: string) => ({
  code: 'unreadable-element' as const,
  key: `class ${type}`,
  say: (count: number, first: string) =>
    `${count === 1 ? `Element ${first} is` : `${count} elements are`} of the class ${type}, which no IFC schema has, and ${count === 1 ? 'is' : 'are'} not read.`,
  advice: `Correct the class in the file${meant(type)}, or export the model again.`,
  most: 50,
});

function meant(type: string): string {
  const near = nearestWord(type, PRODUCT_CLASSES);
  return near === null ? '' : ` (${near} may be meant)`;
}
