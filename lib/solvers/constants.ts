/** Constants of nature, each with the adjustment it comes from. */

/** m/s; exact by the definition of the metre (SI 2019; CODATA 2018 and 2022 agree). */
export const speedOfLightMPerS = 299_792_458;

/** 20 / ln 10: decibels in one neper; exact by definition (ISO 80000-3:2006, annex C). */
export const decibelsPerNeper = 20 / Math.LN10;

/** H/m; CODATA 2022, 1.256 637 061 27(20)e-6: measured since 2019, no longer 4 pi 1e-7. */
export const vacuumPermeabilityHPerM = 1.25663706127e-6;

/** F/m; 1/(mu0 c^2), so that L C = 1/c^2 holds to rounding. */
export const vacuumPermittivityFPerM = 1 / (vacuumPermeabilityHPerM * speedOfLightMPerS * speedOfLightMPerS);
