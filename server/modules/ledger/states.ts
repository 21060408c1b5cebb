import type { CYLINDER_CONTENTS, CYLINDER_KINDS, CYLINDER_STATUSES } from '../../../shared/api/cylinders'
import type { CircuitStatus } from '../../../shared/api/places'
import { plainDate } from '../../../shared/dates/plain-date'
import { fillLimitOf } from '../../../shared/field/fill-limit'
import { kg } from '../../../shared/mass/mass'
import type { CircuitState, CylinderState, OriginalPosting, PostingStates } from '../../../shared/mass/states'
import type { StatesRow } from './ledger.repository'

/** What shared/mass decides by, from a row of read-states.sql. */
export function statesOf(row: StatesRow, original: OriginalPosting | null): PostingStates {
  return {
    cylinder: cylinderState(row, 'cylinder'),
    toCylinder: cylinderState(row, 'to_cylinder'),
    circuit: circuitState(row),
    original: original ?? undefined,
  }
}

function cylinderState(row: StatesRow, as: 'cylinder' | 'to_cylinder'): CylinderState | undefined {
  const of = (column: string): string | null => row[`${as}_${column}`] ?? null
  const id = of('id')
  if (!id) return undefined
  const refrigerant = of('refrigerant') ?? ''
  const waterCapacityKg = of('water_capacity_kg')
  const testDueOn = of('test_due_on')
  return {
    id, refrigerant,
    kind: of('kind') as (typeof CYLINDER_KINDS)[number],
    contents: of('contents') as (typeof CYLINDER_CONTENTS)[number],
    contentKg: kg(of('content_kg') ?? '0'),
    tareKg: kg(of('tare_kg') ?? '0'),
    waterCapacityKg: waterCapacityKg ? kg(waterCapacityKg) : null,
    fillLimitKg: waterCapacityKg ? fillLimitOf(kg(waterCapacityKg), refrigerant) : null,
    testDueOn: testDueOn ? plainDate(testDueOn) : null,
    ownerCustomerId: of('owner_customer_id'),
    status: of('status') as (typeof CYLINDER_STATUSES)[number],
  }
}

function circuitState(row: StatesRow): CircuitState | undefined {
  if (!row.circuit_id) return undefined
  return {
    id: row.circuit_id,
    refrigerant: row.circuit_refrigerant ?? '',
    bookKg: kg(row.circuit_book_kg ?? '0'),
    fullChargeKg: row.circuit_full_charge_kg ? kg(row.circuit_full_charge_kg) : null,
    status: row.circuit_status as CircuitStatus,
    ownerCustomerId: row.circuit_customer_id ?? '',
  }
}
