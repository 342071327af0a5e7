import { type Finding, finding } from '../../domain/finding.ts';
import type { StepFile } from '../../step/step-file.ts';

/** A signature vouches for the bytes of the model as it came, not for a copy with results in it. */
export function signatureVoid({ isSigned }: Pick<StepFile, 'isSigned'>): Finding[] {
  if (!isSigned) return [];
  return [
    finding(
      'signature-void',
      'The model is signed; its signature does not hold for a copy with results written into it.',
      'Keep the signed file; sign the annotated copy anew where a signature is asked for.',
    ),
  ];
}
