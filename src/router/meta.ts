import 'vue-router'
import type { Action } from '#shared/contracts/permissions.ts'

declare module 'vue-router' {
  interface RouteMeta {
    /** Title of the window, and what a screen reader hears after a change of page. */
    title: string
    /** What the reader must be allowed to do; without it anybody may open the page. */
    action?: Action
    /** 'plain': the page stands alone, without bar and rail (signing in). */
    frame?: 'plain'
    /** The page fills the window under the bar and does not scroll (the map). */
    full?: boolean
  }
}
