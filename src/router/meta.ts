import 'vue-router'
import type { Permission } from '../../shared/access/permissions'

declare module 'vue-router' {
  interface RouteMeta {
    /** Key of the page's name in the language file, such as "shell.nav.sites". */
    title: string
    /** Who may open it, by name; the server decides again. */
    permission?: Permission
    /** Open to people who are not signed in, and drawn without the shell. */
    isOpen?: boolean
  }
}
