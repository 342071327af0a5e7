import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseQuantity, QuantityError } from '../../src/domain/units.ts';

describe('a quantity', () => {
  it.each([
    ['150 mm', 'length', 0.15],
    ['150mm', 'length', 0.15],
    ['-.5 m', 'length', -0.5],
    ['10 ft', 'length', 3.048],
    ['2 in', 'length', 0.0508],
    ['5 MN/m', 'forcePerLength', 5e6],
    ['-2 kN/m', 'forcePerLength', -2000],
    ['2 N/mm', 'forcePerLength', 2000],
    ['1.2e3 kip', 'force', 1.2e6 * 4.4482216152605],
    ['0.6 kN/m2', 'forcePerArea', 600],
    ['0.6 kN/m²', 'forcePerArea', 600],
    ['0.6 kN/m^2', 'forcePerArea', 600],
    ['355 N/mm2', 'forcePerArea', 355e6],
    ['1 kPa', 'forcePerArea', 1000],
    ['210 GPa', 'forcePerArea', 2.1e11],
    // NIST SP 811 (2008), appendix B.8: 1 lbf/ft2 = 47.88026 Pa, 1 psi = 6894.757 Pa, 1 lbf/ft = 14.59390 N/m.
    ['1 psf', 'forcePerArea', 47.88026],
    ['1 psi', 'forcePerArea', 6894.757],
    ['1 plf', 'forcePerLength', 14.5939],
    ['25 K', 'temperature', 25],
    ['180 deg', 'angle', Math.PI],
  ] as const)('reads %s as %s in SI', (text, kind, expected) => {
    expect(parseQuantity(text, kind) / expected).toBeCloseTo(1, 6);
  });

  it.each([
    ['5 kN', 'length', 'this is a force; a length (mm, m, in, ft) is due'],
    ['5 m2', 'length', 'this is an area'],
    ['5 kg/m2', 'forcePerArea', 'this is a mass per area'],
    ['5 kN/m3', 'forcePerArea', 'this is a force per volume'],
    ['20 deg', 'length', 'this is an angle'],
    ['5', 'length', 'the unit is missing'],
    ['mm', 'length', 'does not begin with a number'],
    ['5 kN/', 'forcePerLength', 'the unit is cut off'],
    ['1e999 m', 'length', 'too large'],
    ['5 constructor', 'length', '"constructor" is no unit known here'],
  ] as const)('refuses %s where %s is due', (text, kind, message) => {
    expect(() => parseQuantity(text, kind)).toThrow(QuantityError);
    expect(() => parseQuantity(text, kind)).toThrow(message);
  });

  it('is proportional to its number in every unit of a dimension', () => {
    const finite = fc.double({ min: -1e9, max: 1e9, noNaN: true });
    fc.assert(
      fc.property(finite, fc.constantFrom('mm', 'cm', 'm', 'km', 'in', 'ft'), (value, unit) => {
        const expected = value * parseQuantity(`1 ${unit}`, 'length');
        expect(parseQuantity(`${value} ${unit}`, 'length')).toBeCloseTo(
          expected,
          9 - Math.ceil(Math.log10(Math.abs(expected) + 1)),
        );
      }),
    );
  });

  it('is never anything but a finite number or a QuantityError', () => {
    fc.assert(
      fc.property(fc.oneof(fc.string(), fc.stringMatching(/^[0-9.eE+-]{1,8} ?[a-zA-Z/*^0-9]{0,8}$/u)), (text) => {
        try {
          expect(Number.isFinite(parseQuantity(text, 'force'))).toBe(true);
        } catch (error) {
          expect(error).toBeInstanceOf(QuantityError);
        }
      }),
    );
  });
});
