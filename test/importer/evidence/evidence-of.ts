import { readEvidence } from '../../../src/importer/evidence/read-evidence.ts';
import type { Evidence } from '../../../src/importer/evidence/types.ts';
import { IMPORT_DEFAULTS } from '../../../src/importer/options.ts';
import { prepare } from '../../../src/importer/prepare.ts';
import { openStep, type StepFile } from '../../../src/step/step-file.ts';
import { COMMON, stepText } from '../support/model-text.ts';

export const evidenceOfFile = (file: StepFile): Evidence => readEvidence(prepare(file, IMPORT_DEFAULTS).sources);

export const evidenceOf = (data: string, schema = 'IFC4'): Evidence =>
  evidenceOfFile(openStep(new TextEncoder().encode(stepText(data, schema))));

/** COMMON and one plate with the items of its body (references, as in "#100,#101"); `more` defines them. */
export const plateWith = (body: string, more: string, placement = '#16', written = 'IFCPLATE'): string => `${COMMON}
#50=${written}('0ppppppppppppppppppppp',$,'P1',$,$,${placement},#51,'T1');
#51=IFCPRODUCTDEFINITIONSHAPE($,$,(#91));
#91=IFCSHAPEREPRESENTATION(#10,'Body','SweptSolid',(${body}));
${more}`;
