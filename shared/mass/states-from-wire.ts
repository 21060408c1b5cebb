import type { WireCylinder } from '../api/cylinders'
import type { CircuitStanding, WireHistory } from '../api/places'
import type { PlainDate } from '../dates/plain-date'
import { historyFromWire } from '../leak-rate/from-wire'
import { fullChargeOn } from '../leak-rate/history'
import { kg } from './mass'
import type { CircuitState, CylinderState } from './states'

/**
 * A cylinder as it came over the wire or out of the phone's own database.
 *
 * @throws RangeError if a mass cannot be read
 */
export function cylinderStateOf(wire: WireCylinder): CylinderState {
  const { id, refrigerant, kind, contents, testDueOn, ownerCustomerId, status } = wire
  return {
    id, refrigerant, kind, contents, testDueOn, ownerCustomerId, status,
    contentKg: kg(wire.contentKg), tareKg: kg(wire.tareKg),
    waterCapacityKg: wire.waterCapacityKg === null ? null : kg(wire.waterCapacityKg),
    fillLimitKg: wire.fillLimitKg === null ? null : kg(wire.fillLimitKg),
  }
}

/**
 * A circuit as it came over the wire, with the full charge in force on the day of the event.
 *
 * @throws RangeError if a mass cannot be read
 */
export function circuitStateOf(wire: CircuitStanding & { history: WireHistory }, on: PlainDate): CircuitState {
  return {
    id: wire.id, refrigerant: wire.refrigerant, status: wire.status, ownerCustomerId: wire.customerId,
    bookKg: kg(wire.bookChargeKg), fullChargeKg: fullChargeOn(historyFromWire(wire.history).fullCharges, on),
  }
}
