/**
 * The defining factors every other factor is composed from. All are exact by definition.
 * NIST SP 811 (2008): Appendix B.6 (survey foot), B.8 (alphabetical list) and Table 6 (minute, hour, day, litre).
 */
export const foot = 0.3048
export const inch = 0.0254
/** 1200/3937 m (SP 811, B.6): 2 parts in a million longer than the international foot. */
export const surveyFoot = 1200 / 3937

export const minute = 60
export const hour = 3600
export const day = 86400

export const litre = 1e-3
/** 231 cubic inches. */
export const gallonUS = 231 * inch ** 3
/** 4.546 09 L (Canadian and U.K. gallon). */
export const gallonImperial = 4.54609e-3
/** One foot of water over an acre of 43 560 square survey feet, as SP 811 defines the acre. */
export const acreFoot = 43560 * surveyFoot ** 3

export const standardGravity = 9.80665
/** Pound-force: avoirdupois pound of 0.453 592 37 kg under standard gravity. */
export const poundForce = 0.45359237 * standardGravity
/** Conventional mercury: 13 595.1 kg/m³ under standard gravity, pressure of one metre, Pa. */
export const metreOfMercury = 13595.1 * standardGravity
/** Conventional water: 1000 kg/m³ under standard gravity, pressure of one metre, Pa. */
export const metreOfWater = 1000 * standardGravity
