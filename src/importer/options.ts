export interface ImportOptions {
  /** Further classes to read as members, as the standard writes them: IfcPile, IfcRailing. */
  readonly classes: readonly string[];
  /** The steel grade of members whose material says none; null to take the default steel with a finding. */
  readonly defaultMaterial: string | null;
  /** Whether the drawn Axis or the body's centroid line is the member's axis where there are both. */
  readonly axes: 'given' | 'centroid';
}

export const IMPORT_DEFAULTS: ImportOptions = { classes: [], defaultMaterial: null, axes: 'given' };
