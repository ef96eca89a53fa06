export { figuresOf, isWritable } from '#shared/words/estimate-figures.ts'
