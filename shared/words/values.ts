import { parameters } from './parameters.ts'

type Quantity = 'T' | 'S' | 'K'
type StorageClass = 'elastic' | 'specific-yield' | 'apparent' | 'unclassified'

/** A value of the regional table by what it is: storage is told apart by its class. */
interface Valued {
  quantity: Quantity
  storageClass: StorageClass | null
}

export const storageClasses: Record<StorageClass, { name: string; symbol: string; meaning: string }> = {
  elastic: {
    name: 'Storativity, elastic',
    symbol: 'S',
    meaning: 'Water given by compression while the unit stays full.',
  },
  'specific-yield': {
    name: 'Specific yield',
    symbol: 'Sy',
    meaning: 'Water given by drainage, from data late enough to show it.',
  },
  apparent: {
    name: 'Storativity, apparent',
    symbol: 'S (apparent)',
    meaning: 'The test was too short to tell; never used for effects over years.',
  },
  unclassified: {
    name: 'Storativity, unclassified',
    symbol: 'S (unclassified)',
    meaning: 'It is not known what kind of storage was measured.',
  },
}

export const quantityName = ({ quantity, storageClass }: Valued): string =>
  quantity === 'S' ? storageClasses[storageClass ?? 'unclassified'].name : parameters[quantity].name

export const quantitySymbol = ({ quantity, storageClass }: Valued): string =>
  quantity === 'S' ? storageClasses[storageClass ?? 'unclassified'].symbol : parameters[quantity].symbol

export const quantityDimension = ({ quantity }: Pick<Valued, 'quantity'>) => parameters[quantity].dimension

/** What the thickness of a test measured. */
export const thicknessBases = {
  aquifer: 'whole unit',
  screen: 'screened part',
  saturated: 'saturated part',
  unknown: 'unknown',
} as const
