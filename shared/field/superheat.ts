import { temperatureAt, type Looked } from '../refrigerants/saturation'

/**
 * Superheat: suction line temperature minus the dew temperature at suction pressure.
 *
 * @param suctionKpa  [kPa absolute]
 * @param lineCelsius  [°C] measured at the suction line
 * @returns [K]; below zero there is liquid in the suction line, or a reading is off
 */
export function superheat(refrigerant: string, suctionKpa: number, lineCelsius: number): Looked {
  const dew = temperatureAt(refrigerant, 'dewKpa', suctionKpa)
  return dew.ok ? { ok: true, value: lineCelsius - dew.value } : dew
}

/**
 * Subcooling: bubble temperature at liquid pressure minus the liquid line temperature. Blends with glide take
 * dew for superheat and bubble for subcooling.
 *
 * @param liquidKpa  [kPa absolute]
 * @param lineCelsius  [°C] measured at the liquid line
 * @returns [K]; below zero there is vapour in the liquid line, or a reading is off
 */
export function subcooling(refrigerant: string, liquidKpa: number, lineCelsius: number): Looked {
  const bubble = temperatureAt(refrigerant, 'bubbleKpa', liquidKpa)
  return bubble.ok ? { ok: true, value: bubble.value - lineCelsius } : bubble
}

/** Where a value lies against the equipment maker's band. */
export function againstBand(kelvins: number, band: { lowest: number; highest: number }): 'below' | 'within' | 'above' {
  if (kelvins < band.lowest) return 'below'
  return kelvins > band.highest ? 'above' : 'within'
}
