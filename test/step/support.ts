import { openStep, type StepFile } from '../../src/step/step-file.ts';
import type { StepValue } from '../../src/step/values.ts';

export const HEAD = `ISO-10303-21;
HEADER;
FILE_DESCRIPTION(('ViewDefinition [ReferenceView]'),'2;1');
FILE_NAME('bay.ifc','2026-03-01T09:00:00',('A. Modeller'),('An office'),'a toolbox','a modeller','');
FILE_SCHEMA(('IFC4'));
ENDSEC;
`;
export const TAIL = 'ENDSEC;\nEND-ISO-10303-21;\n';

/** Characters up to U+00FF as single bytes. */
export function bytesOf(text: string): Uint8Array {
  return new Uint8Array(Buffer.from(text, 'latin1'));
}

export function textOf(chunks: Iterable<Uint8Array>): string {
  return Buffer.concat([...chunks]).toString('latin1');
}

/** A whole file whose DATA section holds this text. */
export function fileWith(data: string): string {
  return `${HEAD}DATA;\n${data}\n${TAIL}`;
}

export function open(data: string): StepFile {
  return openStep(bytesOf(fileWith(data)));
}

/** The parameters of `#1=IFCX(text);` */
export function argsOf(text: string): readonly StepValue[] {
  return open(`#1=IFCX(${text});`).args(1);
}

/** The single string of which `text` stands between the apostrophes. */
export function stringOf(text: string): { readonly text: StepValue | undefined; readonly problems: readonly string[] } {
  const file = open(`#1=IFCX('${text}');`);
  const [value] = file.args(1);
  return { text: value, problems: file.problems.map((problem) => problem.kind) };
}
