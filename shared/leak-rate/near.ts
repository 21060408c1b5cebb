import type { Percent } from './percent'

/** [% of the threshold] from which a circuit counts as near. Our own figure: a warning, not a rule of law. */
export const NEAR_SHARE = 70

/** Whether a rate has come near a threshold, at or over the share above. */
export const isNear = (rate: Percent, threshold: Percent): boolean => !rate.times(100).dividedBy(threshold).lessThan(NEAR_SHARE)
