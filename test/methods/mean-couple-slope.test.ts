import fc from 'fast-check';
import { expect, it } from 'vitest';
import { meanHeightSlope, meanThrustSlopeAtPower } from '../../src/methods/mean-couple-slope.ts';
import { thrustMomentAtPower, thrustMomentSlopeAtPower } from '../../src/methods/propeller.ts';
import { verticalPositionMoment } from '../../src/methods/trim.ts';

const lift = fc.double({ min: 0.1, max: 2.5, noNaN: true });
const couple = fc.double({ min: -0.1, max: 0.1, noNaN: true });

/** Two lift coefficients far enough apart for a difference to be told from rounding. */
const apart = fc.tuple(lift, lift).filter(([one, other]) => Math.abs(one - other) > 0.01);

it('is the change of the thrust’s moment over that of lift', () => {
  fc.assert(
    fc.property(couple, apart, (moment, [cl, other]) => {
      const change = thrustMomentAtPower(moment, cl, other) - moment;
      expect(meanThrustSlopeAtPower(moment, cl, other)).toBeCloseTo(change / (other - cl), 10);
    }),
  );
});

it('is the slope itself where the two lifts are one', () => {
  expect(meanThrustSlopeAtPower(0.02, 0.4, 0.4)).toBeCloseTo(thrustMomentSlopeAtPower(0.02, 0.4), 14);
});

it('is the change of the couple by height, whose step grows with lift', () => {
  fc.assert(
    fc.property(couple, apart, (shift, [cl, other]) => {
      const change = verticalPositionMoment((shift * other) / cl, other) - verticalPositionMoment(shift, cl);
      expect(meanHeightSlope(shift, cl, other)).toBeCloseTo(change / (other - cl), 10);
    }),
  );
});
