/** Series that neither answer to the mouse nor move by themselves. */
export const quiet = { silent: true, animation: false, emphasis: { disabled: true } } as const
