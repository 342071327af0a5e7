import { describe, expect, it } from 'vitest';
import type { Section } from '../../src/domain/member.ts';
import { chs, rhs } from '../../src/importer/sections/closed-shapes.ts';
import { iShape } from '../../src/importer/sections/i-shape.ts';
import { sectionOf } from '../../src/importer/sections/profile-shape.ts';
import { lShape, tShape, uShape } from '../../src/importer/sections/rolled-shapes.ts';

// Tabled values are from memory of the standards named beside them; the standards were not opened for this file.

const mm = 1e-3;
const cm2 = 1e-4;
const cm4 = 1e-8;
const cm6 = 1e-12;

function i(depth: number, width: number, web: number, flange: number, fillet: number, slope = 0, edge = 0): Section {
  const each = {
    width: width * mm,
    thickness: flange * mm,
    fillet: fillet * mm,
    edgeRadius: edge * mm,
    slope: Math.atan(slope),
  };
  return sectionOf(iShape(null, { depth: depth * mm, web: web * mm, top: each, bottom: each }));
}

const u = (depth: number, width: number, web: number, flange: number, fillet: number, edge: number, slope: number) =>
  sectionOf(
    uShape(null, {
      depth: depth * mm,
      width: width * mm,
      web: web * mm,
      flange: flange * mm,
      fillet: fillet * mm,
      edgeRadius: edge * mm,
      slope: Math.atan(slope),
    }),
  );

const l = (depth: number, width: number, thickness: number, fillet: number) =>
  sectionOf(
    lShape(null, {
      depth: depth * mm,
      width: width * mm,
      thickness: thickness * mm,
      fillet: fillet * mm,
      edgeRadius: (fillet / 2) * mm,
      slope: 0,
    }),
  );

/** EN 10210-2 takes outer corners of 1.5 t and inner ones of 1.0 t. */
const hot = (depth: number, width: number, wall: number) =>
  sectionOf(
    rhs(null, {
      depth: depth * mm,
      width: width * mm,
      wall: wall * mm,
      outer: 1.5 * wall * mm,
      inner: wall * mm,
    }),
  );

const tube = (diameter: number, wall: number) => sectionOf(chs(null, (diameter / 2) * mm, wall * mm));

function expectNear(actual: number, published: number, within: number, what: string): void {
  expect(Math.abs(actual / published - 1), `${what}: ${actual} against ${published}`).toBeLessThan(within);
}

describe('sections against the dimension standards', () => {
  // Euronorm 19-57 and 53-62 (now EN 10365), as makers' tables print them: A cm2, Iy cm4, Iz cm4, It cm4, Iw 10^3 cm6.
  it.each([
    ['IPE 200', i(200, 100, 5.6, 8.5, 12), 28.48, 1943, 142.4, 6.98, 12.99],
    ['IPE 300', i(300, 150, 7.1, 10.7, 15), 53.81, 8356, 603.8, 20.12, 125.9],
    ['IPE 400', i(400, 180, 8.6, 13.5, 21), 84.46, 23130, 1318, 51.08, 490.0],
    ['HE 200 A', i(190, 200, 6.5, 10, 18), 53.83, 3692, 1336, 20.98, 108.0],
    ['HE 200 B', i(200, 200, 9, 15, 18), 78.08, 5696, 2003, 59.28, 171.1],
    ['HE 300 B', i(300, 300, 11, 19, 27), 149.1, 25170, 8563, 185.0, 1688],
  ] as const)('finds the tabled values of %s', (name, section, area, iy, iz, it, iw) => {
    expectNear(section.area, area * cm2, 5e-4, `${name} A`);
    expectNear(section.inertiaY, iy * cm4, 5e-4, `${name} Iy`);
    expectNear(section.inertiaZ, iz * cm4, 5e-4, `${name} Iz`);
    // The junctions' discs are a fit to tests, good to a few per cent.
    expectNear(section.torsion, it * cm4, 0.03, `${name} It`);
    expectNear(section.warping, iw * 1e3 * cm6, 2e-3, `${name} Iw`);
    expect(section.inertiaYZ).toBe(0);
  });

  it('finds the tabled values of UPN 200, whose flanges slope by 8 % (EN 10365, formerly DIN 1026-1)', () => {
    const section = u(200, 75, 8.5, 11.5, 11.5, 6, 0.08);
    expectNear(section.area, 32.2 * cm2, 3e-3, 'A');
    expectNear(section.inertiaY, 1910 * cm4, 3e-3, 'Iy');
    expectNear(section.inertiaZ, 148 * cm4, 6e-3, 'Iz');
    expectNear(section.torsion, 11.9 * cm4, 0.02, 'It');
    // By the middle line, which leaves out that the rounded tips carry less.
    expectNear(section.warping, 9.07e3 * cm6, 0.06, 'Iw');
  });

  it('finds the tabled values of INP 200, whose flanges slope by 14 % (DIN 1025-1)', () => {
    const section = i(200, 90, 7.5, 11.3, 7.5, 0.14, 4.5);
    expectNear(section.area, 33.4 * cm2, 3e-3, 'A');
    expectNear(section.inertiaY, 2140 * cm4, 3e-3, 'Iy');
    expectNear(section.inertiaZ, 117 * cm4, 1e-2, 'Iz');
    expectNear(section.warping, 10.5e3 * cm6, 0.05, 'Iw');
  });

  it('finds the tabled values of L 100x100x10 (EN 10056-1)', () => {
    const section = l(100, 100, 10, 12);
    expectNear(section.area, 19.2 * cm2, 3e-3, 'A');
    expectNear(section.inertiaY, 177 * cm4, 3e-3, 'Iy');
    expectNear(section.inertiaMajor, 280 * cm4, 4e-3, 'Iu');
    expectNear(section.inertiaMinor, 73 * cm4, 4e-3, 'Iv');
  });

  it('finds the tabled values of L 150x100x10 (EN 10056-1)', () => {
    const section = l(150, 100, 10, 12);
    expectNear(section.area, 24.2 * cm2, 3e-3, 'A');
    expectNear(section.inertiaY, 552 * cm4, 3e-3, 'Iy');
    expectNear(section.inertiaZ, 199 * cm4, 5e-3, 'Iz');
    expectNear(section.inertiaMajor, 637 * cm4, 5e-3, 'Iu');
  });

  // EN 10210-2:2006 tables B.1 to B.3: A cm2, Iy cm4, Iz cm4, It cm4.
  it.each([
    ['CHS 88.9x4', tube(88.9, 4), 10.7, 96.3, 96.3, 193],
    ['CHS 114.3x5', tube(114.3, 5), 17.2, 257, 257, 514],
    ['CHS 168.3x5', tube(168.3, 5), 25.7, 856, 856, 1712],
    ['CHS 219.1x6.3', tube(219.1, 6.3), 42.1, 2386, 2386, 4772],
    ['SHS 100x100x5', hot(100, 100, 5), 18.7, 279, 279, 439],
    ['SHS 150x150x8', hot(150, 150, 8), 44.8, 1491, 1491, 2351],
    ['RHS 200x100x6.3', hot(200, 100, 6.3), 35.8, 1829, 613, 1475],
  ] as const)('finds the tabled values of %s', (name, section, area, iy, iz, it) => {
    expectNear(section.area, area * cm2, 4e-3, `${name} A`);
    expectNear(section.inertiaY, iy * cm4, 4e-3, `${name} Iy`);
    expectNear(section.inertiaZ, iz * cm4, 4e-3, `${name} Iz`);
    expectNear(section.torsion, it * cm4, 4e-3, `${name} It`);
    expect(section.warping).toBe(0);
  });

  it('finds half an IPE 300 to have half its area and half its weak inertia', () => {
    const tee = sectionOf(
      tShape(null, {
        depth: 150 * mm,
        width: 150 * mm,
        web: 7.1 * mm,
        flange: 10.7 * mm,
        fillet: 15 * mm,
        flangeEdgeRadius: 0,
        webEdgeRadius: 0,
        webSlope: 0,
        flangeSlope: 0,
      }),
    );
    expectNear(tee.area, (53.81 / 2) * cm2, 5e-4, 'A');
    expectNear(tee.inertiaZ, (603.8 / 2) * cm4, 5e-4, 'Iz');
    expectNear(tee.torsion, (20.12 / 2) * cm4, 0.02, 'It');
  });
});
