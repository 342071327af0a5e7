/** What Pinwright writes on elements and on the project: one table for the property sets and for their templates. */

export type Measure = 'IfcForceMeasure' | 'IfcInteger' | 'IfcLabel' | 'IfcLengthMeasure' | 'IfcText';

export interface PropertyDefinition {
  /** Tables define by a label and hold `measure`; quantities are lengths. */
  readonly kind: 'single' | 'list' | 'table' | 'quantity';
  readonly measure: Measure;
  readonly says: string;
}

export interface SetDefinition {
  readonly says: string;
  readonly applicableTo: string;
  readonly properties: Readonly<Record<string, PropertyDefinition>>;
}

const single = (measure: Measure, says: string): PropertyDefinition => ({ kind: 'single', measure, says });
const list = (measure: Measure, says: string): PropertyDefinition => ({ kind: 'list', measure, says });
const quantity = (says: string): PropertyDefinition => ({ kind: 'quantity', measure: 'IfcLengthMeasure', says });
const table = (measure: Measure, says: string): PropertyDefinition => ({ kind: 'table', measure, says });

/** Many viewers show single values only, so every headline is one; lists and tables come in addition. */
export const SET_DEFINITIONS = {
  Pinwright_Forces: {
    says: 'Axial forces of the bars that this element stands for in the pin-jointed truss.',
    applicableTo: 'IfcElement',
    properties: {
      GreatestTension: single(
        'IfcForceMeasure',
        'Greatest tension in the worst bar; zero where it never is in tension.',
      ),
      TensionFrom: single('IfcLabel', 'Combination or case that the greatest tension comes from.'),
      TensionBar: single('IfcLabel', 'Bar with the greatest tension, where there are several.'),
      GreatestCompression: single(
        'IfcForceMeasure',
        'Greatest compression in the worst bar, negative; zero where it never is in compression.',
      ),
      CompressionFrom: single('IfcLabel', 'Combination or case that the greatest compression comes from.'),
      CompressionBar: single('IfcLabel', 'Bar with the greatest compression, where there are several.'),
      NumberOfBars: single('IfcInteger', 'Bars between joints that the element is split into.'),
      EnvelopeOver: single('IfcLabel', 'What the greatest forces are the greatest of.'),
      SignConvention: single('IfcLabel', 'How the forces are signed.'),
      Note: single('IfcText', 'What has to be known to read the forces rightly.'),
      BarNames: list('IfcLabel', 'Names of the bars in order along the element.'),
      TensionAlongElement: list('IfcForceMeasure', 'Greatest tension of each bar in order along the element.'),
      CompressionAlongElement: list('IfcForceMeasure', 'Greatest compression of each bar in order along the element.'),
      ForceByCombination: table('IfcForceMeasure', 'Force of the bar with the largest one, by combination.'),
      ForceByCase: table('IfcForceMeasure', 'Force of the bar with the largest one, by load case.'),
      SupportDown: single(
        'IfcForceMeasure',
        'Greatest downward force that this element brings to a support at its end.',
      ),
      SupportDownFrom: single('IfcLabel', 'Combination or case that it comes from.'),
      SupportUplift: single('IfcForceMeasure', 'Greatest uplift at a support at an end of this element.'),
      SupportUpliftFrom: single('IfcLabel', 'Combination or case that it comes from.'),
      SupportHorizontal: single('IfcForceMeasure', 'Greatest horizontal force at a support at an end of this element.'),
      SupportHorizontalFrom: single('IfcLabel', 'Combination or case that it comes from.'),
      SupportNote: single('IfcText', 'What the support forces are.'),
    },
  },
  Pinwright_Lengths: {
    says: 'Lengths of this element as a line of force; quantities of the idealised truss, not of the steel.',
    applicableTo: 'IfcElement',
    properties: {
      AxisAsDrawn: quantity('Length of the axis as the model has it.'),
      BetweenJoints: quantity('Length of all its bars between joints.'),
      LongestBar: quantity('Length of its longest bar between joints.'),
      GreatestShift: quantity('How far joining moved its nodes off the axis as drawn, at most.'),
    },
  },
  Pinwright_Findings: {
    says: 'What the reader of the model should know about this element.',
    applicableTo: 'IfcElement',
    properties: {
      Count: single('IfcInteger', 'Number of findings that name this element.'),
      Severity: single('IfcLabel', 'The gravest of them: error, warning or note.'),
      Codes: single('IfcLabel', 'Their codes.'),
      Findings: single('IfcText', 'All findings with what to do about them, in sentences.'),
      Sentences: list('IfcText', 'The same, one by one.'),
    },
  },
  Pinwright_Run: {
    says: 'The analysis that the Pinwright property sets of this model come from.',
    applicableTo: 'IfcProject',
    properties: {
      Program: single('IfcLabel', 'Program and version.'),
      ModelSha256: single('IfcLabel', 'SHA-256 of the model without what Pinwright has written into it.'),
      Verdict: single('IfcText', 'Whether the structure stands.'),
      Caution: single('IfcText', 'What these results are and are not.'),
      Members: single('IfcInteger', 'Elements read as lines of force.'),
      Nodes: single('IfcInteger', 'Joints of the truss.'),
      Bars: single('IfcInteger', 'Bars between joints.'),
      Mechanisms: single('IfcInteger', 'Independent ways it can move without straining a bar.'),
      SelfStressStates: single('IfcInteger', 'Independent sets of bar forces in balance with no load.'),
      Errors: single('IfcInteger', 'Findings of severity error.'),
      Warnings: single('IfcInteger', 'Findings of severity warning.'),
      Notes: single('IfcInteger', 'Findings of severity note.'),
      LoadCases: single('IfcInteger', 'Load cases.'),
      Combinations: single('IfcInteger', 'Combinations of load cases.'),
      EnvelopeOver: single('IfcLabel', 'What the greatest forces are the greatest of.'),
    },
  },
} as const satisfies Readonly<Record<string, SetDefinition>>;

/** Sets that hold quantities are an IfcElementQuantity, all others an IfcPropertySet. */
export const holdsQuantities = ({ properties }: SetDefinition): boolean =>
  Object.values(properties).every(({ kind }) => kind === 'quantity');

export type SetName = keyof typeof SET_DEFINITIONS;

export const definitionOf = (name: SetName): SetDefinition => SET_DEFINITIONS[name];

type PropertyName<S extends SetName> = Extract<keyof (typeof SET_DEFINITIONS)[S]['properties'], string>;

export type Value = number | string;

/** Values by label; labels differ from each other. */
export type ValueTable = readonly (readonly [label: string, value: number])[];

export type PropertyValue = Value | readonly Value[] | ValueTable | null;

/**
 * The values of one set by property: a single value, a list or a table as its definition says. What is null or an empty
 * list is not written.
 */
export type SetValues<S extends SetName = SetName> = {
  readonly [P in PropertyName<S>]?: PropertyValue;
};
