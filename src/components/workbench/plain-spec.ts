import type { OwnMethod } from '#shared/hydraulics/any-kind.ts'
import type { OptionSpec } from '#shared/hydraulics/method.ts'

/** Settings whose description says all that a form needs. */
export type PlainSpec = Extract<
  OptionSpec | OwnMethod['options'][number],
  { kind: 'choice' | 'flag' | 'answer' | 'number' }
>

const plain: readonly string[] = ['choice', 'flag', 'answer', 'number'] satisfies PlainSpec['kind'][]

export const isPlain = <Spec extends { kind: string }>(
  spec: Spec,
): spec is Extract<Spec, { kind: PlainSpec['kind'] }> => plain.includes(spec.kind)
