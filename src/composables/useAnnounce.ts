import { inject, onScopeDispose, provide, readonly, shallowRef } from 'vue'
import type { InjectionKey, ShallowRef } from 'vue'

export interface Notice {
  id: number
  text: string
  tone: 'plain' | 'good' | 'bad'
  /** Seconds in which the act can be taken back; null where it cannot. */
  secondsLeft: number | null
}

interface NoticeOptions {
  tone?: Notice['tone']
}
interface UndoOptions {
  text: string
  /** Called if the person takes it back. */
  onUndo: () => void
  /** Called when the time is over: now it may be done for good. */
  onExpire?: () => void
  seconds?: number
}

export interface Announcer {
  notices: Readonly<ShallowRef<readonly Notice[]>>
  announce: (text: string, options?: NoticeOptions) => void
  offerUndo: (options: UndoOptions) => void
  undo: (id: number) => void
  dismiss: (id: number) => void
}

const ANNOUNCER: InjectionKey<Announcer> = Symbol('announcer')
const NOTICE_SECONDS = 6
const UNDO_SECONDS = 10

/** Made once, by the app; what it holds is shown and spoken by NoticeStack. */
export function provideAnnouncer(): Announcer {
  const notices = shallowRef<readonly Notice[]>([])
  const acts = new Map<number, { onUndo: () => void; onExpire?: () => void }>()
  const ages = new Map<number, number>()
  let lastId = 0

  const show = (notice: Omit<Notice, 'id'>): number => {
    const id = ++lastId
    notices.value = [...notices.value, { ...notice, id }]
    return id
  }
  const drop = (id: number) => {
    notices.value = notices.value.filter((notice) => notice.id !== id)
    acts.delete(id)
    ages.delete(id)
  }

  const announce = (text: string, { tone = 'plain' }: NoticeOptions = {}) => {
    show({ text, tone, secondsLeft: null })
  }
  const offerUndo = ({ text, onUndo, onExpire, seconds = UNDO_SECONDS }: UndoOptions) => {
    acts.set(show({ text, tone: 'plain', secondsLeft: seconds }), { onUndo, onExpire })
  }
  const undo = (id: number) => {
    const act = acts.get(id)
    drop(id)
    act?.onUndo()
  }
  const dismiss = (id: number) => {
    const act = acts.get(id)
    drop(id)
    act?.onExpire?.()
  }
  const tick = () => {
    for (const notice of notices.value) {
      if (notice.secondsLeft !== null) {
        if (notice.secondsLeft <= 1) dismiss(notice.id)
        continue
      }
      const age = (ages.get(notice.id) ?? 0) + 1
      ages.set(notice.id, age)
      // A bad notice stays until it has been read and put away.
      if (age >= NOTICE_SECONDS && notice.tone !== 'bad') drop(notice.id)
    }
    if (notices.value.some((notice) => notice.secondsLeft !== null)) {
      notices.value = notices.value.map((notice) =>
        notice.secondsLeft === null ? notice : { ...notice, secondsLeft: notice.secondsLeft - 1 })
    }
  }

  const timer = setInterval(tick, 1000)
  onScopeDispose(() => clearInterval(timer))

  const announcer: Announcer = { notices: readonly(notices), announce, offerUndo, undo, dismiss }
  provide(ANNOUNCER, announcer)
  return announcer
}

/** Says something to the person, seen and heard. */
export function useAnnounce(): Announcer {
  const announcer = inject(ANNOUNCER, null)
  if (!announcer) throw new Error('useAnnounce is used outside the app.')
  return announcer
}
