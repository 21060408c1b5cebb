import { plainDate, type PlainDate } from '../../../shared/dates/plain-date'
import { kg } from '../../../shared/mass/mass'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import { say } from '../../language'
import type { RecordCircuit, RecordEntry, RecordLeak, RecordMark, RecordTest, ServiceRecord } from '../../papers/service-record'
import { badField, notFound } from '../../problem'
import * as standing from '../standing/standing.service'
import type { ServiceRecordQuery } from './papers.dto'
import { circuitRows, fullChargeRows, siteRow, type CircuitRow } from './places.repository'
import { getVisit } from '../visits/visits.service'
import * as repository from './record.repository'
import { fullChargeOf, groupedBy, ownerOf, rateOf, siteOf, type RateRow } from './wire'

/** What a record is about, before its details are read. */
interface Occasion {
  siteId: string
  servicedOn: PlainDate
  remark: string | null
  entries: repository.EntryRow[]
  calculations: ServiceRecord['calculations']
  /** Null: every circuit of the site on which something was done on those days. */
  circuitIds: string[] | null
  personIds: string[]
}

/**
 * Everything the service record of a visit or of one posting says.
 *
 * @throws Problem not-found where it is not this person's to see, or a posting touched no circuit; bad-input unless exactly one of both is named
 */
export async function recordOf(tx: Tx, who: Actor, query: ServiceRecordQuery): Promise<ServiceRecord> {
  const occasion = await occasionOf(tx, who, query)
  const site = await siteRow(tx, who, occasion.siteId)
  if (!site) throw notFound('site')
  const days = [...new Set([occasion.servicedOn, ...occasion.entries.map((entry) => entry.occurred_on)])]
  const asked = { siteId: site.id, circuitIds: occasion.circuitIds, days }
  const leakIds = occasion.entries.flatMap((entry) => entry.leak_id ?? [])
  const leaks = await repository.leakRows(tx, who.companyId, { ...asked, leakIds })
  const tests = await repository.recordTestRows(tx, who.companyId, asked)
  const circuitIds = occasion.circuitIds ?? [...new Set([
    ...[...occasion.entries, ...leaks, ...tests].map((row) => row.circuit_id), ...await repository.markedCircuitIds(tx, who.companyId, site.id, days),
  ])]
  const marks = await repository.markRows(tx, who.companyId, circuitIds, occasion.servicedOn)
  const doers = [...occasion.personIds, ...[...occasion.entries, ...leaks, ...tests].map((row) => row.person_id)]
  const people = await repository.personRows(tx, who.companyId, [...new Set([...doers, ...marks.map((row) => row.person_id)])])
  const parts = { entries: occasion.entries, leaks, tests, marks, people, locale: who.locale, isOwner: who.customerIds !== null }
  return {
    site: siteOf(site), owner: ownerOf(site), method: site.leak_rate_method, servicedOn: occasion.servicedOn, remark: occasion.remark, calculations: occasion.calculations,
    people: people.filter((person) => doers.includes(person.id))
      .map((person) => ({ name: person.name, certificateNumber: person.certificate_number, certificateType: person.certificate_type })),
    circuits: await circuitsOf(tx, who.companyId, await circuitRows(tx, who.companyId, site.id, circuitIds), occasion.servicedOn, parts),
  }
}

async function occasionOf(tx: Tx, who: Actor, { visitId, postingId }: ServiceRecordQuery): Promise<Occasion> {
  if (visitId && postingId) throw badField('postingId', 'notHere')
  if (visitId) {
    const visit = await repository.visitRow(tx, who, visitId)
    if (!visit) throw notFound('visit')
    return {
      siteId: visit.site_id, servicedOn: plainDate(visit.visited_on), remark: visit.remark, entries: await repository.entryRows(tx, who, { visitId }),
      circuitIds: null, personIds: [visit.person_id], calculations: (await getVisit(tx, who, visitId)).calculations,
    }
  }
  if (!postingId) throw badField('visitId', 'needed')
  const entries = await repository.entryRows(tx, who, { postingId })
  const [entry] = entries
  if (!entry) throw notFound('posting')
  return { siteId: entry.site_id, servicedOn: plainDate(entry.occurred_on), remark: null, entries, circuitIds: [entry.circuit_id], personIds: [], calculations: [] }
}

/** The rows of all circuits of a record, to be told apart by circuit. */
interface Parts {
  entries: repository.EntryRow[]
  leaks: repository.LeakRow[]
  tests: repository.RecordTestRow[]
  marks: repository.MarkRow[]
  people: repository.PersonRow[]
  locale: string
  isOwner: boolean
}

async function circuitsOf(tx: Tx, companyId: string, circuits: CircuitRow[], on: PlainDate, parts: Parts): Promise<RecordCircuit[]> {
  const ids = circuits.map((circuit) => circuit.id)
  const fullCharges = groupedBy(await fullChargeRows(tx, companyId, ids, on), (row) => row.circuit_id)
  const result: RecordCircuit[] = []
  for (const circuit of circuits) {
    const { thresholds, packs } = await standing.sheetOf(tx, companyId, circuit.id, () => on)
    const fullCharge = fullCharges(circuit.id).at(-1)
    const own = <Row extends { circuit_id: string }>(rows: Row[]): Row[] => rows.filter((row) => row.circuit_id === circuit.id)
    result.push({
      systemTag: circuit.system_tag, systemName: circuit.system_name, location: circuit.location, maker: circuit.maker, model: circuit.model, serial: circuit.serial,
      name: circuit.name, refrigerant: circuit.refrigerant, category: circuit.category, fullCharge: fullCharge ? fullChargeOf(fullCharge) : null,
      entries: own(parts.entries).map((row) => entryOf(row, parts)),
      leaks: own(parts.leaks).map((row) => leakOf(row, parts)),
      tests: own(parts.tests).map((row) => testOf(row, parts)),
      marks: own(parts.marks).map((row) => markOf(row, parts)),
      thresholds: thresholds.map((threshold) => ({ ...threshold, category: circuit.category })), packs,
    })
  }
  return result
}

const personOf = ({ people }: Parts, id: string): repository.PersonRow =>
  people.find((person) => person.id === id) ?? { id, name: '', certificate_number: null, certificate_type: null }

function entryOf(row: repository.EntryRow, parts: Parts): RecordEntry {
  const person = personOf(parts, row.person_id)
  return {
    kind: row.kind, occurredOn: plainDate(row.occurred_on), personName: person.name, certificateNumber: person.certificate_number,
    certificateType: person.certificate_type, refrigerant: row.refrigerant, massKg: kg(row.mass_kg), entered: row.entered,
    cylinderNumber: row.cylinder_number, isCylinderWithheld: parts.isOwner && row.cylinder_id !== null,
    purpose: row.purpose, isComplete: row.is_complete, part: row.part, workDone: row.work_done, note: row.note,
    rate: row.is_rated ? rateOf(row as RateRow) : null,
    reversal: row.reversal_reason === null || row.reversal_on === null
      ? null
      : { reason: row.reversal_reason, personName: row.reversal_person_name ?? '', occurredOn: plainDate(row.reversal_on) },
  }
}

function leakOf(row: repository.LeakRow, parts: Parts): RecordLeak {
  return {
    foundOn: plainDate(row.found_on), place: placeOf(row, row.position, parts.locale), cause: row.cause, method: row.method,
    personName: personOf(parts, row.person_id).name, note: row.note, repairedOn: row.repaired_on ? plainDate(row.repaired_on) : null, repair: row.repair,
  }
}

function testOf(row: repository.RecordTestRow, parts: Parts): RecordTest {
  return {
    kind: row.kind, testedOn: plainDate(row.tested_on), type: row.type, passed: row.passed, showsAllRepaired: row.shows_all_repaired,
    leakPlace: row.leak_id ? placeOf(row, row.leak_position, parts.locale) : null, personName: personOf(parts, row.person_id).name, note: row.note,
  }
}

function markOf(row: repository.MarkRow, parts: Parts): RecordMark {
  return {
    markedOn: plainDate(row.marked_on), place: placeOf(row, row.component_position, parts.locale), text: row.text,
    personName: personOf(parts, row.person_id).name, resolvedOn: row.resolved_on ? plainDate(row.resolved_on) : null,
  }
}

/** The component and the position on it, as far as they are known. */
function placeOf({ component_kind, component_name }: { component_kind: string | null; component_name: string | null }, position: string | null, locale: string): string | null {
  const kind = component_kind && say(locale, `papers.component.${component_kind}`)
  const name = component_name ?? ''
  // most people name a coil "Condenser coil 2": the kind is then said already
  const component = kind && (name.toLowerCase().includes(kind.toLowerCase()) ? name : say(locale, 'papers.place', { kind, name }).trim())
  return [component, position].filter(Boolean).join(', ') || null
}
