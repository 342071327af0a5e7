import { IMPORT_DEFAULTS, type ImportOptions } from '../../../src/importer/options.ts';
import { readPhysicalModel } from '../../../src/importer/read-physical-model.ts';
import type { ImportedModel } from '../../../src/importer/types.ts';
import { openStep } from '../../../src/step/step-file.ts';

/** Millimetres and radians, one context, one root placement: what most small models here begin with. */
export const COMMON = `
#1=IFCPROJECT('0aaaaaaaaaaaaaaaaaaaaa',$,'P',$,$,$,$,(#10),#2);
#2=IFCUNITASSIGNMENT((#3,#4));
#3=IFCSIUNIT(*,.LENGTHUNIT.,.MILLI.,.METRE.);
#4=IFCSIUNIT(*,.PLANEANGLEUNIT.,$,.RADIAN.);
#10=IFCGEOMETRICREPRESENTATIONCONTEXT($,'Model',3,1.E-5,#11,$);
#11=IFCAXIS2PLACEMENT3D(#12,$,$);
#12=IFCCARTESIANPOINT((0.,0.,0.));
#13=IFCDIRECTION((0.,0.,1.));
#14=IFCDIRECTION((1.,0.,0.));
#15=IFCDIRECTION((0.,1.,0.));
#16=IFCLOCALPLACEMENT($,#11);
#20=IFCRECTANGLEPROFILEDEF(.AREA.,'Flat',$,100.,200.);
`;

export const stepText = (data: string, schema = 'IFC4'): string =>
  `ISO-10303-21;\nHEADER;\nFILE_DESCRIPTION((''),'2;1');\nFILE_NAME('','',(''),(''),'','','');\n` +
  `FILE_SCHEMA(('${schema}'));\nENDSEC;\nDATA;\n${data}\nENDSEC;\nEND-ISO-10303-21;\n`;

export const importText = (data: string, schema = 'IFC4', options: Partial<ImportOptions> = {}): ImportedModel =>
  readPhysicalModel(openStep(new TextEncoder().encode(stepText(data, schema))), { ...IMPORT_DEFAULTS, ...options });

/** COMMON and one beam with the items of its body and axis (references, as in "#100,#101"); `more` defines them. */
export function beamWith(parts: { body?: string; axis?: string; more: string; placement?: string }): string {
  const representations = [parts.axis === undefined ? '' : '#90', parts.body === undefined ? '' : '#91'];
  return `${COMMON}
#50=IFCBEAM('0bbbbbbbbbbbbbbbbbbbbb',$,'B1',$,$,${parts.placement ?? '#16'},#51,'T1',.BEAM.);
#51=IFCPRODUCTDEFINITIONSHAPE($,$,(${representations.filter((r) => r !== '').join(',')}));
${parts.axis === undefined ? '' : `#90=IFCSHAPEREPRESENTATION(#10,'Axis','Curve3D',(${parts.axis}));`}
${parts.body === undefined ? '' : `#91=IFCSHAPEREPRESENTATION(#10,'Body','SweptSolid',(${parts.body}));`}
${parts.more}`;
}
