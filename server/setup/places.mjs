import { fileURLToPath } from 'node:url'

/** The folder of the program. */
export const root = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '')

/** @param {string} path relative to the folder of the program */
export const inRoot = (path) => `${root}/${path}`
