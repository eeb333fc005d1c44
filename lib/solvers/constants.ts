/** Constants of nature, each with the adjustment it comes from. */

/** m/s; exact by the definition of the metre (SI 2019; CODATA 2018 and 2022 agree). */
export const speedOfLightMPerS = 299_792_458;

/** 20 / ln 10: decibels in one neper; exact by definition (ISO 80000-3:2006, annex C). */
export const decibelsPerNeper = 20 / Math.LN10;
