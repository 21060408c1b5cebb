import { computed, ref, shallowRef } from 'vue'
import { defineStore } from 'pinia'
import type { Permission } from '../../shared/access/permissions'
import { mayRole } from '../../shared/access/permissions'
import type { Me, Preferences, SignIn } from '../../shared/api/people'
import { toProblem } from '../api/problem'
import type { Problem } from '../api/problem'
import * as api from '../api/session.api'
import { forgetPerson, rememberedPerson, rememberPerson } from '../offline/remembered-person'

export const DEFAULT_PREFERENCES: Preferences = { massUnit: 'lb', pressureUnit: 'psig', temperatureUnit: 'F', theme: 'system', locale: 'en' }

/** Who is signed in, what that person may do and how they like to read. */
export const useSessionStore = defineStore('session', () => {
  const me = shallowRef<Me | null>(null)
  const state = ref<'unknown' | 'in' | 'out'>('unknown')
  /** Why it is not known who is signed in, such as no connection at the start. */
  const problem = shallowRef<Problem | null>(null)
  const preferences = computed(() => me.value?.preferences ?? DEFAULT_PREFERENCES)

  const may = (permission: Permission): boolean => me.value !== null && mayRole(me.value.role, permission)

  /** Asks the server once who is signed in; later calls answer from memory. */
  async function ensureLoaded(): Promise<void> {
    if (state.value !== 'unknown') return
    problem.value = null
    try {
      enter(await api.getMe())
    } catch (thrown) {
      const failure = toProblem(thrown)
      // Without a line the person of last time goes on; the server asks again at the first request that reaches it.
      const remembered = failure.kind === 'offline' ? rememberedPerson() : null
      if (remembered) enter(remembered)
      else if (failure.kind === 'signed-out') leave()
      else problem.value = failure
    }
  }

  async function signIn(entry: SignIn): Promise<void> {
    enter(await api.signIn(entry))
  }

  async function acceptInvitation(token: string, entry: { name: string; password: string }): Promise<void> {
    enter(await api.acceptInvitation(token, entry))
  }

  async function signOut(): Promise<void> {
    await api.signOut()
    leave()
  }

  async function change(patch: api.MePatch): Promise<void> {
    enter(await api.patchMe(patch))
  }

  /** Shown at once, put back if the server refuses. */
  async function prefer(preference: Partial<Preferences>): Promise<void> {
    const before = me.value
    if (!before) return
    me.value = { ...before, preferences: { ...before.preferences, ...preference } }
    try {
      me.value = await api.patchMe({ preferences: preference })
    } catch (thrown) {
      me.value = before
      throw thrown
    }
  }

  function enter(person: Me): void {
    me.value = person
    rememberPerson(person)
    state.value = 'in'
    problem.value = null
  }

  function leave(): void {
    me.value = null
    forgetPerson()
    state.value = 'out'
  }

  return {
    me: computed(() => me.value), state: computed(() => state.value), problem: computed(() => problem.value), preferences,
    may, ensureLoaded, signIn, acceptInvitation, signOut, change, prefer, leave,
  }
})
