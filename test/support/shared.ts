import { existsSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';

const checkout = fileURLToPath(new URL('../..', import.meta.url));

/** Public models, schemas and independent checkers that are not part of the project, where they are at hand. */
const shared = process.env.PINWRIGHT_SHARED ?? resolve(checkout, '..', 'shared');

/** The public models that are STEP files. */
export const PUBLIC_STEP_MODELS = [
  'analysis-view-house.ifc',
  'analysis-view-portal-ifc4-inch.ifc',
  'beam-standard-case-ifc4.ifc',
  'bent-beam-ifc4x3.ifc',
  'brep-beam.ifc',
  'cardinal-points-ifc4x3.ifc',
  'clipped-beam.ifc',
  'fabrication-model.ifc',
  'grid-placement-ifc4x3.ifc',
  'gridshell-roof.ifc',
  'large-id.ifc',
  'large-offset.ifc',
  'mapped-axis-beam.ifc',
  'mirrored-profiles-inch.ifc',
  'mixed-frame.ifc',
  'newline-in-string.ifc',
  'six-shapes.ifc',
  'steel-frame.ifc',
  'tessellated-beam-ifc4x3.ifc',
  'timber-house-ifc4.ifc',
];

/** The path of a public model, or null where it is absent. */
export function publicModel(name: string): string | null {
  return present(join(shared, 'data', name));
}

/** The path of an independent checker (a Python program), or null where it is absent. */
export function checker(name: string): string | null {
  return present(join(shared, 'tools', name));
}

/** A demo model or brief of the project's own. */
export function fixture(name: string): string {
  return join(checkout, 'fixtures', name);
}

function present(path: string): string | null {
  return existsSync(path) ? path : null;
}
