import type { WireOverview } from '../../shared/api/places'
import { get } from './client'

export const getOverview = (): Promise<WireOverview> => get<WireOverview>('/api/overview')
