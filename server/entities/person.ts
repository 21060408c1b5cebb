import { Column, Entity, PrimaryColumn } from 'typeorm'
import type { Preferences } from '../../shared/api/people'
import type { Role } from '../../shared/access/roles'

@Entity('person')
export class Person {
  @PrimaryColumn('uuid') companyId: string
  @PrimaryColumn('uuid') id: string
  @Column('text') email: string
  @Column('text') name: string
  @Column('text') role: Role
  @Column('text', { nullable: true }) passwordHash: string | null
  @Column('text', { nullable: true }) certificateNumber: string | null
  @Column('text', { nullable: true }) certificateType: string | null
  @Column('jsonb') preferences: Preferences
  @Column('timestamptz', { nullable: true }) disabledAt: Date | null
  @Column('integer') version: number
}
