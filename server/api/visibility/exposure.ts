/** How visible a well or a pumping test is. */
export interface Exposure {
  visibility: 'published' | 'internal' | 'private'
  embargoUntil: Date | null
}

const openness = { private: 0, internal: 1, published: 2 }

/** An embargo hides what is published: it is then as open as what is internal. */
const degree = ({ visibility, embargoUntil }: Exposure) =>
  visibility === 'published' && embargoUntil ? openness.internal : openness[visibility]

/** A child is never more visible than its parent. */
export const isMoreVisible = (child: Exposure, parent: Exposure): boolean => degree(child) > degree(parent)

/** Whether a test would be more visible than its well, or show a private well to others. */
export const testShowsHidden = (test: Exposure, well: Exposure, hasPrivateWells: boolean): boolean =>
  isMoreVisible(test, well) || (test.visibility !== 'private' && hasPrivateWells)
