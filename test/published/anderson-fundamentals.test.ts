import { describe, expect, it } from 'vitest';
import { sectionByName } from '../../src/methods/sections-table.ts';
import { camberLineAerodynamics } from './textbook-forms.ts';

/**
 * J. D. Anderson, Fundamentals of Aerodynamics, example 4.6 (4.2 in older editions), from memory: the
 * NACA 23012 by thin-aerofoil theory. Camber line of the 230 series: z/c = 2.6595 (x³ − 0.6075 x² +
 * 0.1147 x) ahead of x = 0.2025, straight behind at slope −0.02208 (as printed there).
 */
const slope = (x: number) => (x < 0.2025 ? 2.6595 * (3 * x ** 2 - 1.215 * x + 0.1147) : -0.02208);
const theory = camberLineAerodynamics(slope, [0.2025]);
const degree = Math.PI / 180;

describe('NACA 23012', () => {
  it('thin aerofoil: zero lift at −1.09°, moment −0.0127', () => {
    expect(Math.abs(theory.zeroLiftAngle / degree + 1.09)).toBeLessThan(0.01);
    expect(Math.abs(theory.quarterChordMoment + 0.0127)).toBeLessThan(0.0003);
  });

  it('our shipped section lies within 0.5° and 0.01 of it', () => {
    const section = sectionByName('naca-23012')!;
    expect(Math.abs(section.zeroLiftAngle - theory.zeroLiftAngle)).toBeLessThan(0.5 * degree);
    expect(Math.abs(section.moment - theory.quarterChordMoment)).toBeLessThan(0.01);
  });
});
