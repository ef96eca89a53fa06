import { kindOfMethod } from '#shared/hydraulics/any-kind.ts'
import { methods, type MethodId } from '#shared/hydraulics/catalogue.ts'
import type { MethodGroup } from './method-group-ids.ts'
import type { SiteValue } from './types.ts'

/** A reported slug test is a slug test; of any other reported value the method did not come down to us. */
export function methodGroup({ method, origin }: Pick<SiteValue, 'method' | 'origin'>): MethodGroup {
  if (Object.hasOwn(methods, method)) return methods[method as MethodId].family
  if (origin === 'slug-test') return 'slug'
  const kind = kindOfMethod(method)
  return kind === 'constant-rate' ? 'reported' : kind
}
