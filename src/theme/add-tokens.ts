import { weighbackPreset } from './preset'

/** Gives the preset what one more PrimeVue component needs; called once, where that component is wrapped. */
export function addTokens(component: string, tokens: object): void {
  Object.assign(weighbackPreset.components, { [component]: tokens })
}
