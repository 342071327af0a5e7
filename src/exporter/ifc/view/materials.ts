import type { ResultMember } from '../../../domain/result.ts';
import type { StepRef } from '../../../step/values.ts';
import { label } from '../block.ts';
import { type NewFile, single } from '../new-file.ts';

type Material = NonNullable<ResultMember['material']>;

/** A material with its numbers, in SI. */
export function writeMaterial(file: NewFile, material: Material): StepRef {
  const { name, elasticModulus, density, expansion, yieldStrength, ultimateStrength } = material;
  if (file.isIfc2x3) {
    const written = file.add('IFCMATERIAL', label(name));
    const strengths = [yieldStrength, ultimateStrength];
    const mechanical = [null, elasticModulus, null, null, expansion, ...strengths];
    file.add('IFCMECHANICALSTEELMATERIALPROPERTIES', written, ...mechanical, null, null, null, null, null);
    file.add('IFCGENERALMATERIALPROPERTIES', written, null, null, density);
    return written;
  }
  const written = file.add('IFCMATERIAL', label(name), null, 'steel');
  const put = (set: string, properties: readonly StepRef[]) => {
    if (properties.length > 0) file.add('IFCMATERIALPROPERTIES', set, null, properties, written);
  };
  put('Pset_MaterialCommon', [single(file, 'MassDensity', 'IFCMASSDENSITYMEASURE', density)]);
  put('Pset_MaterialMechanical', [
    single(file, 'YoungModulus', 'IFCMODULUSOFELASTICITYMEASURE', elasticModulus),
    single(file, 'ThermalExpansionCoefficient', 'IFCTHERMALEXPANSIONCOEFFICIENTMEASURE', expansion),
  ]);
  const strength = (stated: string, value: number | null) =>
    value === null ? [] : [single(file, stated, 'IFCPRESSUREMEASURE', value)];
  put('Pset_MaterialSteel', [
    ...strength('YieldStress', yieldStrength),
    ...strength('UltimateStress', ultimateStrength),
  ]);
  return written;
}
