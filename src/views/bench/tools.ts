import { defineAsyncComponent } from 'vue'
import type { Component } from 'vue'

/** The calculators on the bench, in the order of a day's work. A new one is a line here and a file beside it. */
export const TOOLS: readonly { key: string; component: Component }[] = [
  { key: 'saturation', component: defineAsyncComponent(() => import('./SaturationTool.vue')) },
  { key: 'superheat', component: defineAsyncComponent(() => import('./SuperheatTool.vue')) },
  { key: 'standing', component: defineAsyncComponent(() => import('./StandingTool.vue')) },
  { key: 'vacuum', component: defineAsyncComponent(() => import('./VacuumTool.vue')) },
  { key: 'fill', component: defineAsyncComponent(() => import('./FillTool.vue')) },
  { key: 'charge', component: defineAsyncComponent(() => import('./ChargeTool.vue')) },
  { key: 'rate', component: defineAsyncComponent(() => import('./RateTool.vue')) },
  { key: 'co2e', component: defineAsyncComponent(() => import('./Co2eTool.vue')) },
  { key: 'units', component: defineAsyncComponent(() => import('./UnitsTool.vue')) },
]
