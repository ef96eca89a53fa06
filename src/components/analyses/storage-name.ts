import type { AnalysisResult } from '#shared/hydraulics/analysis.ts'
import { storageClasses } from '#shared/words/values.ts'

/** How the storage of a result is called: specific yield and storativity are never one name. */
export function storageName(storageClass: AnalysisResult['storageClass']): { symbol: string; name: string } {
  const { name } = storageClasses[storageClass ?? 'unclassified']
  return { symbol: storageClass === 'specific-yield' ? 'Sy' : 'S', name }
}
