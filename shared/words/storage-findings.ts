import type { StorageErrorCode } from '#shared/hydraulics/storage-errors.ts'
import type { Sentences } from './findings.ts'

/** Findings of the solutions with casing storage, skin or a falling water table. */
export const storageFindings: Sentences<string> = {
  'casing-storage-unseen': ({ span }) =>
    `The readings used begin at ${span('from_s')}, when water stored in the casing no longer matters (after ${span('over_s')}). The confined curve says the same with less.`,
  'skin-unseen': () =>
    'The level inside the pumped well is not among the readings, and only that shows the skin. Use the solution without skin.',
  'elastic-limb-missed': ({ number }) =>
    `The readings begin at Tt/(Sr²) of ${number('number')}, above ${number('limit')}: the early part of the curve, which elastic storativity comes from, is missed.`,
  'drainage-limb-missed': ({ number }) =>
    `The readings end at Tt/(Sy·r²) of ${number('number')}, below ${number('limit')}: drainage has not come to govern yet, and specific yield is weak evidence. Pump longer.`,
  'drainage-limb-reached': ({ number }) =>
    `The readings reach Tt/(Sy·r²) of ${number('number')}, where drainage governs, so that specific yield comes from the late part of the curve.`,
}

/** Refusals of the same solutions. */
export const storageRefusals: Sentences<StorageErrorCode> = {
  'analysis/no-well-radius': () =>
    'A well that stores water needs the radius of its screen or open hole. Enter it on the page of the pumped well.',
  'analysis/no-casing-radius': () =>
    'A well that stores water needs the radius of its casing. Enter it on the page of the pumped well.',
  'analysis/water-table-thickness': () =>
    'Delayed response needs the saturated thickness of the aquifer. Enter it, or fit the late readings with the confined curve.',
}
