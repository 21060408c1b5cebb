import { computed, onScopeDispose, reactive, ref, shallowRef, watch } from 'vue'
import { useRoute, useRouter } from 'vue-router'
import type { ListQuery, Page } from '../../shared/api/page'
import { isCalledOff, toProblem } from '../api/problem'
import type { Problem } from '../api/problem'

interface ListOptions<Row, Filter extends string> {
  /** Asks for one page; `query` holds search, sort, after and the filters that are set. */
  fetch: (query: ListQuery & Partial<Record<Filter, string>>, signal: AbortSignal) => Promise<Page<Row>>
  /** Names of the filters, as they stand in the address and on the wire. */
  filters?: readonly Filter[]
  /** The order without a choice, such as "name" or "-severity". */
  defaultSort?: string
  /** Filters that always hold and do not stand in the address. */
  fixed?: () => Partial<Record<Filter, string>>
}

const SEARCH_AFTER_MS = 220

/** A list whose search, order and filters stand in the address, read page by page by key. */
export function useList<Row, Filter extends string = never>({ fetch, filters = [], defaultSort = '', fixed }: ListOptions<Row, Filter>) {
  const route = useRoute()
  const router = useRouter()
  const rows = shallowRef<readonly Row[]>([])
  const next = shallowRef<string | null>(null)
  const problem = shallowRef<Problem | null>(null)
  const isLoading = ref(true)
  const isLoadingMore = ref(false)
  const path = route.path
  let running: AbortController | null = null
  let typing: ReturnType<typeof setTimeout> | undefined

  const inAddress = (name: string): string => {
    const value = route.query[name]
    return typeof value === 'string' ? value : ''
  }
  const search = ref(inAddress('search'))
  const sort = computed(() => inAddress('sort') || defaultSort)
  const chosen = computed(() => {
    const set: Partial<Record<Filter, string>> = {}
    for (const name of filters) if (inAddress(name)) set[name] = inAddress(name)
    return set
  })
  const isNarrowed = computed(() => inAddress('search') !== '' || Object.keys(chosen.value).length > 0)

  const setInAddress = (changes: Record<string, string>) => {
    const query = { ...route.query }
    for (const [name, value] of Object.entries(changes)) {
      if (value) query[name] = value
      else delete query[name]
    }
    return router.replace({ query, hash: route.hash })
  }

  async function ask(after: string | null): Promise<void> {
    running?.abort()
    const mine = new AbortController()
    running = mine
    problem.value = null
    isLoading.value = after === null
    isLoadingMore.value = after !== null
    try {
      const query = { ...fixed?.(), ...chosen.value, search: inAddress('search') || undefined, sort: sort.value || undefined, after: after ?? undefined }
      const page = await fetch(query, mine.signal)
      if (running !== mine) return
      rows.value = after === null ? page.rows : [...rows.value, ...page.rows]
      next.value = page.next
    } catch (thrown) {
      if (running === mine && !isCalledOff(thrown)) problem.value = toProblem(thrown)
    } finally {
      if (running === mine) {
        isLoading.value = false
        isLoadingMore.value = false
      }
    }
  }

  const reload = (): Promise<void> => ask(null)
  const loadMore = async (): Promise<void> => {
    if (next.value !== null && !isLoadingMore.value) await ask(next.value)
  }
  const setSearch = (text: string) => {
    search.value = text
  }
  const setFilter = (name: Filter, value: string) => setInAddress({ [name]: value })
  const setSort = (value: string) => setInAddress({ sort: value === defaultSort ? '' : value })
  const showAll = () => {
    search.value = ''
    return setInAddress(Object.fromEntries(['search', ...filters].map((name) => [name, ''])))
  }

  watch(search, (text) => {
    clearTimeout(typing)
    typing = setTimeout(() => void setInAddress({ search: text.trim() }), SEARCH_AFTER_MS)
  })
  watch(
    () => JSON.stringify([inAddress('search'), sort.value, chosen.value, fixed?.()]),
    () => {
      if (route.path !== path) return
      if (search.value.trim() !== inAddress('search')) search.value = inAddress('search')
      void reload()
    },
    { immediate: true },
  )
  onScopeDispose(() => {
    clearTimeout(typing)
    running?.abort()
  })

  const state = computed<'loading' | 'rows' | 'empty' | 'problem'>(() => {
    if (rows.value.length > 0) return 'rows'
    if (problem.value) return 'problem'
    return isLoading.value ? 'loading' : 'empty'
  })
  const hasMore = computed(() => next.value !== null)

  // reactive, so that a view hands the whole list on as one thing
  return reactive({
    rows, state, problem, isLoading, isLoadingMore, hasMore, isNarrowed, search, sort, chosen,
    reload, loadMore, setSearch, setFilter, setSort, showAll,
  })
}

/** What ListPage takes; every useList is one, whatever its rows. */
export interface ListOnScreen<Row> {
  readonly rows: readonly Row[]
  readonly state: 'loading' | 'rows' | 'empty' | 'problem'
  readonly problem: Problem | null
  readonly isLoading: boolean
  readonly isLoadingMore: boolean
  readonly hasMore: boolean
  readonly isNarrowed: boolean
  readonly search: string
  setSearch: (text: string) => void
  readonly sort: string
  reload: () => Promise<void>
  loadMore: () => Promise<void>
  setSort: (sort: string) => unknown
  showAll: () => unknown
}
