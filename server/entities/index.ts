import { Circuit } from './circuit'
import { Company } from './company'
import { Component } from './component'
import { Customer } from './customer'
import { Cylinder } from './cylinder'
import { FullCharge } from './full-charge'
import { Leak } from './leak'
import { Partner } from './partner'
import { Person } from './person'
import { PersonLink } from './person-link'
import { PersonSession } from './person-session'
import { Site } from './site'
import { System } from './system'
import { Verification } from './verification'
import { Visit } from './visit'
import { WatchMark } from './watch-mark'

/** Every table that TypeORM reads and writes. The ledger itself is written by plain SQL in modules/ledger. */
export const entities = [Circuit, Company, Component, Customer, Cylinder, FullCharge, Leak, Partner, Person, PersonLink, PersonSession, Site, System, Verification, Visit, WatchMark]
