import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  dynamicPressure,
  equivalentSpeedFromCalibrated,
  geopotentialHeight,
  insideAtmosphere,
  liftCoefficient,
  machFromCalibratedSpeed,
  speedOfSound,
  standardDensity,
  standardPressure,
  standardTemperature,
  trueSpeedFromCalibrated,
} from '../../src/methods/atmosphere.ts';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const knot = 1852 / 3600;

describe('standard atmosphere', () => {
  it('obeys the gas law, the hydrostatic law, and joins at the tropopause', () => {
    fc.assert(
      fc.property(number(-1900, 19900), (height) => {
        const density = standardDensity(height);
        expect(standardPressure(height)).toBeCloseTo(density * 287.05287 * standardTemperature(height), 6);
        fc.pre(Math.abs(height - 11000) > 2);
        const slope = (standardPressure(height + 1) - standardPressure(height - 1)) / 2;
        expect(slope / (-9.80665 * density)).toBeCloseTo(1, 6);
      }),
    );
    expect(standardPressure(11000 - 1e-6)).toBeCloseTo(standardPressure(11000), 3);
    expect(standardTemperature(15000)).toBeCloseTo(216.65, 10);
    expect(speedOfSound(0)).toBeCloseTo(340.294, 3);
  });

  it('geometric and geopotential height part with height', () => {
    // ISO 2533, from memory: 11 019 m geometric is 11 000 m geopotential.
    expect(geopotentialHeight(11019.07)).toBeCloseTo(11000, 1);
    expect(geopotentialHeight(0)).toBe(0);
    expect(insideAtmosphere(20000)).toBe(true);
    expect(insideAtmosphere(20001)).toBe(false);
    expect(insideAtmosphere(-2001)).toBe(false);
  });
});

describe('airspeeds', () => {
  it('at sea level calibrated, equivalent and true are one', () => {
    fc.assert(
      fc.property(number(5, 300), (speed) => {
        expect(trueSpeedFromCalibrated(speed, 0)).toBeCloseTo(speed, 8);
        expect(equivalentSpeedFromCalibrated(speed, 0)).toBeCloseTo(speed, 8);
      }),
    );
  });

  it('slow: equivalent is nearly calibrated, dynamic pressure ½ρ0V²', () => {
    const speed = 40;
    expect(equivalentSpeedFromCalibrated(speed, 3000)).toBeCloseTo(speed, 1);
    expect(equivalentSpeedFromCalibrated(speed, 3000)).toBeLessThan(speed);
    expect(dynamicPressure(speed, 3000) / (0.5 * 1.225 * speed ** 2)).toBeCloseTo(1, 2);
  });

  it('dynamic pressure is ½ρV² at the true speed', () => {
    fc.assert(
      fc.property(number(10, 150), number(0, 15000), (speed, height) => {
        const v = trueSpeedFromCalibrated(speed, height);
        expect(dynamicPressure(speed, height) / (0.5 * standardDensity(height) * v ** 2)).toBeCloseTo(1, 9);
      }),
    );
  });

  it('300 kt calibrated is Mach 0.78 at the crossover height of about 29 300 ft', () => {
    // Common practice, no source: crossover of 300 kt and Mach 0.78.
    expect(machFromCalibratedSpeed(300 * knot, 29315 * 0.3048)).toBeCloseTo(0.78, 3);
  });

  it('lift coefficient by hand: 610 kg, 54 m/s at sea level, 11.4 m²', () => {
    // 610·9.80665/(½·1.225·54²·11.4); compressibility changes ½ρV² by nothing at sea level.
    expect(liftCoefficient(610, 54, 0, 11.4)).toBeCloseTo(0.293802, 4);
    expect(liftCoefficient(610, 54, 2500, 11.4)).toBeGreaterThan(liftCoefficient(610, 54, 0, 11.4));
  });
});
