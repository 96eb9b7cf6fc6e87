import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  flatSheetDownwash,
  handbookDownwashGradient,
  handbookInRange,
  isForwardSwept,
  rolledUpPairDownwash,
  torenbeekDownwashGradient,
  torenbeekInRange,
  wakePlaneHeight,
} from '../../src/methods/downwash.ts';
import { integrate } from './quadrature.ts';

const degree = Math.PI / 180;
const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });

describe('published forms', () => {
  it('by pocket calculator', () => {
    // A 7, λ 0.5, Λ¼ 20°, h/b 0.08, l/b 0.45, a(M)/a(0) 1.03:
    // K_A = 0.142857 − 1/28.3319 = 0.107561; K_λ = 8.5/7; K_H = 0.92/0.9^⅓ = 0.952883; √cos 20° = 0.969378.
    const product = 0.107561 * 1.214286 * 0.952883 * 0.969378;
    expect(handbookDownwashGradient(7, 0.5, 20 * degree, 0.08, 0.45, 1.03)).toBeCloseTo(
      1.03 * 4.44 * product ** 1.19,
      5,
    );
    // a 4.6, A 7, λ 0.5, r 0.9, m 0.16: (λr)^¼ = 0.45^¼ = 0.819038; 8.05/(21.99115·0.819038·1.16).
    expect(torenbeekDownwashGradient(4.6, 7, 0.5, 0.9, 0.16)).toBeCloseTo(0.385288, 5);
  });

  it('both fall with aspect ratio, arm and height, up or down alike', () => {
    fc.assert(
      fc.property(
        number(4, 20),
        number(0.3, 1),
        number(0.2, 0.7),
        number(0, 0.3),
        (a, taper, arm, height) => {
          const book = (aa: number, l: number, h: number) => handbookDownwashGradient(aa, taper, 0, h, l, 1);
          const other = (aa: number, l: number, h: number) =>
            torenbeekDownwashGradient(5, aa, taper, 2 * l, 2 * h);
          for (const form of [book, other]) {
            const here = form(a, arm, height);
            expect(form(a * 1.05, arm, height)).toBeLessThan(here);
            expect(form(a, arm * 1.05, height)).toBeLessThan(here);
            expect(form(a, arm, height + 0.02)).toBeLessThan(here);
            expect(form(a, arm, -height)).toBe(here);
          }
        },
      ),
    );
  });

  it('has no value for a tail ahead of the wing', () => {
    expect(torenbeekDownwashGradient(5, 8, 0.5, -0.9, 0.1)).toBeNaN();
    expect(handbookInRange(0, 0.1, -0.4)).toBe(false);
    expect(torenbeekInRange(0.5, 0, -0.9)).toBe(false);
  });

  it('says where it was not made for', () => {
    expect(isForwardSwept(-5 * degree)).toBe(true);
    expect(isForwardSwept(-2 * degree)).toBe(false);
    expect(handbookInRange(-5 * degree, 0.1, 0.4)).toBe(false);
    expect(handbookInRange(30 * degree, 0.1, 0.4)).toBe(true);
    expect(handbookInRange(0, 1.2, 0.4)).toBe(false);
    expect(torenbeekInRange(0.5, -5 * degree, 0.9)).toBe(false);
    expect(torenbeekInRange(0.5, 30 * degree, 0.9)).toBe(false);
    expect(torenbeekInRange(0.29, 0, 0.9)).toBe(false);
    expect(torenbeekInRange(0.3, 0, 0.9)).toBe(true);
  });
});

describe('limits', () => {
  it('flat elliptic sheet: equals the integral of its trailing vorticity far behind', () => {
    // γ(y) = Γ0 y/(s²√(1−y²/s²)) with y = s sin φ: w = (1/2π)∫γ/y dy, and Γ0 = 2 V S a/(πb) for α = 1.
    const [a, ratio, semispan] = [4.7, 7.3, 1];
    const area = (2 * semispan) ** 2 / ratio;
    const circulation = (2 * area * a) / (Math.PI * 2 * semispan);
    const w = integrate(() => circulation / (2 * Math.PI * semispan), -Math.PI / 2, Math.PI / 2);
    expect(flatSheetDownwash(a, ratio)).toBeCloseTo(w, 9);
  });

  it('rolled-up pair: equals the field of two line vortices a quarter of π spans apart', () => {
    const [a, ratio, span] = [4.7, 7.3, 2];
    const circulation = (2 * (span ** 2 / ratio) * a) / (Math.PI * span);
    const distance = (Math.PI / 8) * span;
    expect(rolledUpPairDownwash(a, ratio)).toBeCloseTo((2 * circulation) / (2 * Math.PI * distance), 12);
  });
});

describe('height above the wake', () => {
  it('by hand: rises with the tail, falls with angle of attack, and the wake sinks with lift', () => {
    // 0.4 cos 5° − 3.1 (sin 5° − 2·0.6/(7π)) = 0.398478 − 3.1 (0.0871557 − 0.0545674).
    expect(wakePlaneHeight(0.4, 3.1, 5 * degree, 0.6, 7)).toBeCloseTo(0.297454, 5);
    expect(wakePlaneHeight(0.4, 3.1, 0, 0, 7)).toBe(0.4);
    expect(wakePlaneHeight(0.4, 3.1, 8 * degree, 0.6, 7)).toBeLessThan(0.297);
    expect(wakePlaneHeight(0.4, 3.1, 5 * degree, 0.9, 7)).toBeGreaterThan(0.298);
  });

  it('a tail on the stream line from the trailing edge is at nil height without lift', () => {
    expect(wakePlaneHeight(3 * Math.tan(0.1), 3, 0.1, 0, 8)).toBeCloseTo(0, 12);
  });
});
