import { z } from 'zod'

/**
 * The closed lists that several contracts share. They stand apart from what is built on the catalogue of methods, so
 * that the map does not load the methods.
 */
export const wellKind = z.enum(['well', 'piezometer', 'planned'])
export const adoptedQuantity = z.enum(['T', 'S', 'K'])
export const evidence = z.enum(['firm', 'fair', 'slight'])
export const storageClass = z.enum(['elastic', 'specific-yield', 'apparent', 'unclassified'])
