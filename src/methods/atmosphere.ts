/**
 * International Standard Atmosphere and airspeeds. ISO 2533:1975 (ICAO Doc 7488), from memory.
 * SI throughout. Heights are geopotential: a pressure altimeter set to 1013.25 hPa reads this height,
 * whatever the day. A height measured with a tape goes through `geopotentialHeight` first.
 * Fitted from 0 to 20 km; down to −2 km the same lapse holds; above 20 km the 20 km layer is carried on.
 */

const seaLevelTemperature = 288.15;
const seaLevelPressure = 101325;
/** Specific gas constant of air [J/(kg K)]. */
const gasConstant = 287.05287;
const gravity = 9.80665;
const heatRatio = 1.4;
/** Temperature gradient of the troposphere [K/m]. */
const lapse = -0.0065;
const tropopause = 11000;
/** Radius of the Earth that the standard uses for geopotential [m]. */
const earthRadius = 6356766;

const tropopauseTemperature = seaLevelTemperature + lapse * tropopause;
const pressureExponent = -gravity / (lapse * gasConstant);
const tropopausePressure =
  seaLevelPressure * (tropopauseTemperature / seaLevelTemperature) ** pressureExponent;
const scaleHeight = (gasConstant * tropopauseTemperature) / gravity;
const seaLevelSoundSpeed = Math.sqrt(heatRatio * gasConstant * seaLevelTemperature);

/** γ/(γ−1) and (γ−1)/2 of the isentropic relation between Mach number and impact pressure. */
const isentropicExponent = heatRatio / (heatRatio - 1);
const isentropicFactor = (heatRatio - 1) / 2;

/** Lowest and highest geopotential height of the fit [m]. */
export const atmosphereRange = { from: -2000, to: 20000 } as const;

/** Whether the geopotential height [m] lies where the layers of this atmosphere hold. */
export function insideAtmosphere(height: number): boolean {
  return height >= atmosphereRange.from && height <= atmosphereRange.to;
}

/** Geopotential height [m] of a geometric height [m]: r h/(r + h). Exact in the standard's field of gravity. */
export function geopotentialHeight(geometricHeight: number): number {
  return (earthRadius * geometricHeight) / (earthRadius + geometricHeight);
}

/** Temperature [K] at a geopotential height [m]. */
export function standardTemperature(height: number): number {
  return height < tropopause ? seaLevelTemperature + lapse * height : tropopauseTemperature;
}

/** Pressure [Pa] at a geopotential height [m]. */
export function standardPressure(height: number): number {
  if (height < tropopause) {
    return seaLevelPressure * (standardTemperature(height) / seaLevelTemperature) ** pressureExponent;
  }
  return tropopausePressure * Math.exp(-(height - tropopause) / scaleHeight);
}

/** Density [kg/m³] at a geopotential height [m]. */
export function standardDensity(height: number): number {
  return standardPressure(height) / (gasConstant * standardTemperature(height));
}

/** Speed of sound [m/s] at a geopotential height [m]. */
export function speedOfSound(height: number): number {
  return Math.sqrt(heatRatio * gasConstant * standardTemperature(height));
}

/**
 * Mach number [-] from calibrated airspeed: the impact pressure that the speed means at sea level, taken
 * at the pressure of the height.
 * @param calibratedSpeed CAS, ≥ 0 [m/s]
 * @param height          pressure height, geopotential [m]
 * Exact for subsonic isentropic flow; not above Mach 1.
 */
export function machFromCalibratedSpeed(calibratedSpeed: number, height: number): number {
  const seaLevelMach = calibratedSpeed / seaLevelSoundSpeed;
  const impact = (1 + isentropicFactor * seaLevelMach ** 2) ** isentropicExponent - 1;
  const impactHere = (impact * seaLevelPressure) / standardPressure(height);
  return Math.sqrt(((1 + impactHere) ** (1 / isentropicExponent) - 1) / isentropicFactor);
}

/** True airspeed [m/s] from calibrated airspeed [m/s] and pressure height [m], on a standard day. */
export function trueSpeedFromCalibrated(calibratedSpeed: number, height: number): number {
  return machFromCalibratedSpeed(calibratedSpeed, height) * speedOfSound(height);
}

/** Equivalent airspeed a0 M √(p/p0) [m/s] from calibrated airspeed [m/s] and pressure height [m]. Exact, subsonic. */
export function equivalentSpeedFromCalibrated(calibratedSpeed: number, height: number): number {
  const pressureRatio = standardPressure(height) / seaLevelPressure;
  return seaLevelSoundSpeed * machFromCalibratedSpeed(calibratedSpeed, height) * Math.sqrt(pressureRatio);
}

/** Dynamic pressure (γ/2) p M² [Pa] from calibrated airspeed [m/s] and pressure height [m]. Exact, subsonic. */
export function dynamicPressure(calibratedSpeed: number, height: number): number {
  const mach = machFromCalibratedSpeed(calibratedSpeed, height);
  return (heatRatio / 2) * standardPressure(height) * mach ** 2;
}

/**
 * Lift coefficient in level flight, m g/(q S) [-].
 * @param mass            [kg]
 * @param calibratedSpeed CAS, > 0 [m/s]
 * @param height          pressure height, geopotential [m]
 * @param area            S, > 0 [m²]
 * Exact; standard gravity.
 */
export function liftCoefficient(mass: number, calibratedSpeed: number, height: number, area: number): number {
  return (mass * gravity) / (dynamicPressure(calibratedSpeed, height) * area);
}

/** Mach number at a dynamic pressure q [Pa] and pressure height [m], √(2q/(γ p)) [-]. Exact. */
export function machFromDynamicPressure(pressure: number, height: number): number {
  return Math.sqrt((2 * pressure) / (heatRatio * standardPressure(height)));
}

/** Calibrated airspeed [m/s] from Mach number [-] and pressure height [m]; the reverse of `machFromCalibratedSpeed`. Exact, subsonic. */
export function calibratedSpeedFromMach(mach: number, height: number): number {
  const impactHere = (1 + isentropicFactor * mach ** 2) ** isentropicExponent - 1;
  const impact = (impactHere * standardPressure(height)) / seaLevelPressure;
  return seaLevelSoundSpeed * Math.sqrt(((1 + impact) ** (1 / isentropicExponent) - 1) / isentropicFactor);
}

/** Dynamic pressure [Pa] that carries a mass [kg] at a lift coefficient > 0 [-] on an area [m²]: m g/(S C_L). Exact. */
export function dynamicPressureAtLift(mass: number, liftCoefficient: number, area: number): number {
  return (mass * gravity) / (area * liftCoefficient);
}
