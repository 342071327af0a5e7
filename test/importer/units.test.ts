import { describe, expect, it } from 'vitest';
import type { UnitKind } from '../../src/importer/unit-kinds.ts';
import { readUnits, type Units } from '../../src/importer/units.ts';
import { openStep } from '../../src/step/step-file.ts';
import { stepText } from './support/model-text.ts';

/** A project whose assignment lists `assigned`; `more` defines them. */
function units(assigned: string, more: string, schema = 'IFC4'): Units {
  const text = stepText(
    `#1=IFCPROJECT('0aaaaaaaaaaaaaaaaaaaaa',$,'P',$,$,$,$,$,#2);\n#2=IFCUNITASSIGNMENT((${assigned}));\n${more}`,
    schema,
  );
  return readUnits(openStep(new TextEncoder().encode(text)));
}

const si = (id: number, type: string, name: string, prefix = '$') =>
  `#${id}=IFCSIUNIT(*,.${type}.,${prefix === '$' ? '$' : `.${prefix}.`},.${name}.);`;

/** By a measure with unit, as the standard wants it. */
const converted = (id: number, type: string, name: string, value: number, base: number) =>
  `#${id}=IFCCONVERSIONBASEDUNIT(#99,.${type}.,'${name}',#${id + 100});
#${id + 100}=IFCMEASUREWITHUNIT(IFCRATIOMEASURE(${value}),#${base});`;

/** By its name alone. */
const named = (id: number, type: string, name: string) =>
  `#${id}=IFCCONVERSIONBASEDUNIT(#99,.${type}.,'${name}',$);\n#99=IFCDIMENSIONALEXPONENTS(0,0,0,0,0,0,0);`;

const derived = (id: number, type: string, elements: readonly (readonly [unit: number, power: number])[]) =>
  `#${id}=IFCDERIVEDUNIT((${elements.map((_, i) => `#${id * 10 + i}`).join(',')}),.${type}.,$);
${elements.map(([unit, power], i) => `#${id * 10 + i}=IFCDERIVEDUNITELEMENT(#${unit},${power});`).join('\n')}`;

describe('an SI unit', () => {
  it.each([
    ['EXA', 1e18],
    ['PETA', 1e15],
    ['TERA', 1e12],
    ['GIGA', 1e9],
    ['MEGA', 1e6],
    ['KILO', 1e3],
    ['HECTO', 1e2],
    ['DECA', 1e1],
    ['DECI', 1e-1],
    ['CENTI', 1e-2],
    ['MILLI', 1e-3],
    ['MICRO', 1e-6],
    ['NANO', 1e-9],
    ['PICO', 1e-12],
    ['FEMTO', 1e-15],
    ['ATTO', 1e-18],
  ])('takes the prefix %s', (prefix, factor) => {
    expect(units('#3', si(3, 'LENGTHUNIT', 'METRE', prefix)).length).toBe(factor);
    expect(units('#3', si(3, 'PRESSUREUNIT', 'PASCAL', prefix)).unitFactor('pressure')).toBe(factor);
  });

  it('has its prefix belong to the metre where it is squared or cubed', () => {
    const found = units(
      '#3,#4',
      si(3, 'AREAUNIT', 'SQUARE_METRE', 'CENTI') + si(4, 'VOLUMEUNIT', 'CUBIC_METRE', 'MILLI'),
    );
    expect(found.unitFactor('area')).toBeCloseTo(1e-4, 18);
    expect(found.unitFactor('volume')).toBeCloseTo(1e-9, 22);
  });

  it('of mass is the gram, so that a kilogram is 1', () => {
    expect(units('#3', si(3, 'MASSUNIT', 'GRAM', 'KILO')).unitFactor('mass')).toBe(1);
  });
});

describe('a conversion-based unit', () => {
  // Exact by definition: the international yard and pound agreement of 1959; US survey foot 1200/3937 m; g 9.80665 m/s2.
  const pound = 0.45359237 * 9.80665;
  it.each([
    ['length', 'LENGTHUNIT', 'INCH', 0.0254],
    ['length', 'LENGTHUNIT', 'FOOT', 0.3048],
    ['length', 'LENGTHUNIT', 'YARD', 0.9144],
    ['length', 'LENGTHUNIT', 'MILE', 1609.344],
    ['length', 'LENGTHUNIT', 'US survey foot', 1200 / 3937],
    ['length', 'LENGTHUNIT', 'US survey feet', 1200 / 3937],
    ['angle', 'PLANEANGLEUNIT', 'DEGREE', Math.PI / 180],
    ['force', 'FORCEUNIT', 'pound-force', pound],
    ['force', 'FORCEUNIT', 'POUND_FORCE', pound],
    ['force', 'FORCEUNIT', 'KIP', 1000 * pound],
    ['pressure', 'PRESSUREUNIT', 'PSI', 6894.757293168361],
    ['pressure', 'PRESSUREUNIT', 'ksi', 6894757.293168361],
    ['area', 'AREAUNIT', 'SQUARE FOOT', 0.09290304],
    ['mass', 'MASSUNIT', 'POUND', 0.45359237],
  ] as const)('of %s, %s named %s is known without its factor', (kind, type, name, factor) => {
    expect(units('#5', named(5, type, name)).unit(kind)).toEqual({
      factor: expect.closeTo(factor, 12),
      stated: true,
      fault: null,
    });
  });

  it('goes by its own factor first, through others that it is made of', () => {
    const more =
      si(3, 'LENGTHUNIT', 'METRE', 'MILLI') +
      converted(5, 'LENGTHUNIT', 'INCH', 25.4, 3) +
      converted(6, 'LENGTHUNIT', 'HAND', 4, 5);
    expect(units('#6', more).length).toBeCloseTo(0.1016, 12);
  });

  it('with an offset keeps its size', () => {
    const more = `${si(3, 'THERMODYNAMICTEMPERATUREUNIT', 'KELVIN')}
#5=IFCCONVERSIONBASEDUNITWITHOFFSET(#99,.THERMODYNAMICTEMPERATUREUNIT.,'Fahrenheit',#6,459.67);
#6=IFCMEASUREWITHUNIT(IFCRATIOMEASURE(0.5555555555555556),#3);`;
    expect(units('#5', more).unitFactor('temperature')).toBeCloseTo(5 / 9, 12);
  });

  it('that is made of itself is not known', () => {
    expect(units('#5', converted(5, 'LENGTHUNIT', 'ELL', 2, 5)).unit('length')).toEqual({
      factor: 1,
      stated: false,
      fault: "the unit 'ELL' is not known",
    });
  });
});

describe('a context-dependent unit', () => {
  it('is taken where its name says what it is, and a fault where it does not', () => {
    const of = (name: string) => units('#5', `#5=IFCCONTEXTDEPENDENTUNIT(#99,.LENGTHUNIT.,'${name}');`).unit('length');
    expect(of('FOOT')).toEqual({ factor: 0.3048, stated: true, fault: null });
    expect(of('CUBIT')).toEqual({ factor: 1, stated: false, fault: "the unit 'CUBIT' is not known" });
  });
});

describe('a derived unit', () => {
  const base =
    si(3, 'LENGTHUNIT', 'METRE', 'MILLI') +
    si(4, 'FORCEUNIT', 'NEWTON', 'KILO') +
    si(6, 'MASSUNIT', 'GRAM', 'KILO') +
    si(7, 'THERMODYNAMICTEMPERATUREUNIT', 'KELVIN') +
    si(8, 'LENGTHUNIT', 'METRE');

  it.each([
    [
      'linearForce',
      'LINEARFORCEUNIT',
      [
        [4, 1],
        [8, -1],
      ],
      1e3,
    ],
    [
      'linearStiffness',
      'LINEARSTIFFNESSUNIT',
      [
        [4, 1],
        [3, -1],
      ],
      1e6,
    ],
    [
      'planarForce',
      'PLANARFORCEUNIT',
      [
        [4, 1],
        [8, -2],
      ],
      1e3,
    ],
    [
      'moment',
      'TORQUEUNIT',
      [
        [4, 1],
        [3, 1],
      ],
      1,
    ],
    [
      'elasticModulus',
      'MODULUSOFELASTICITYUNIT',
      [
        [4, 1],
        [3, -2],
      ],
      1e9,
    ],
    [
      'massDensity',
      'MASSDENSITYUNIT',
      [
        [6, 1],
        [3, -3],
      ],
      1e9,
    ],
    ['secondMoment', 'MOMENTOFINERTIAUNIT', [[3, 4]], 1e-12],
    ['warpingConstant', 'WARPINGCONSTANTUNIT', [[3, 6]], 1e-18],
    ['thermalExpansion', 'THERMALEXPANSIONCOEFFICIENTUNIT', [[7, -1]], 1],
  ] as const)('of %s is the product of its elements', (kind, type, elements, factor) => {
    const { factor: found, stated } = units('#3,#4,#5', base + derived(5, type, elements)).unit(kind);
    expect(found / factor).toBeCloseTo(1, 12);
    expect(stated).toBe(true);
  });

  it('of another dimension than its type is not taken', () => {
    const found = units(
      '#4,#8,#5',
      base +
        derived(5, 'LINEARFORCEUNIT', [
          [4, 1],
          [8, -2],
        ]),
    ).unit('linearForce');
    expect(found).toEqual({ factor: 1e3, stated: false, fault: 'unit #5 is a unit of something else' });
  });
});

describe('a kind of quantity that the file has no unit for', () => {
  const metricMix = units('#3,#4', si(3, 'LENGTHUNIT', 'METRE', 'MILLI') + si(4, 'FORCEUNIT', 'NEWTON', 'KILO'));

  it.each([
    ['area', 1e-6],
    ['secondMoment', 1e-12],
    ['linearForce', 1e6],
    ['pressure', 1],
    ['elasticModulus', 1],
    ['massDensity', 1],
  ] as readonly (readonly [UnitKind, number])[])('follows from lengths and forces, or is SI: %s', (kind, factor) => {
    expect(metricMix.unitFactor(kind) / factor).toBeCloseTo(1, 12);
    expect(metricMix.unit(kind).stated).toBe(false);
  });

  it('of elasticity takes the unit of pressure', () => {
    expect(units('#3', si(3, 'PRESSUREUNIT', 'PASCAL', 'MEGA')).unit('elasticModulus')).toEqual({
      factor: 1e6,
      stated: true,
      fault: null,
    });
  });

  it('is SI where the file has no units at all', () => {
    const none = readUnits(openStep(new TextEncoder().encode(stepText('#1=IFCPERSON($,$,$,$,$,$,$,$);'))));
    for (const kind of ['length', 'angle', 'force', 'area', 'linearForce'] as const) {
      expect(none.unit(kind)).toEqual({ factor: 1, stated: false, fault: null });
    }
    expect(none).toMatchObject({ lengthName: 'm', lengthStated: false, angleStated: false });
  });
});

describe('the unit that a property carries itself', () => {
  it('is read by instance, and only for its own kind', () => {
    const found = units('#3', si(3, 'LENGTHUNIT', 'METRE') + si(4, 'PRESSUREUNIT', 'PASCAL', 'MEGA'));
    expect(found.factorOf(4, 'elasticModulus')).toBe(1e6);
    expect(found.factorOf(4, 'length')).toBeNull();
    expect(found.factorOf(77, 'length')).toBeNull();
  });
});
