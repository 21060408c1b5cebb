import type { InjectionKey, Ref } from 'vue'
import type { Preferences } from '../../shared/api/people'

/** The preferences of the person at the screen, provided by the app. */
export const PREFERENCES: InjectionKey<Readonly<Ref<Preferences>>> = Symbol('preferences')
