import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('person_session')
export class PersonSession {
  @PrimaryColumn('uuid') companyId: string
  @PrimaryColumn('uuid') id: string
  @Column('uuid') personId: string
  @Column('bytea') refreshHash: Buffer
  @Column('bytea', { nullable: true }) previousHash: Buffer | null
  @Column('text') userAgent: string
  @Column('timestamptz') startedAt: Date
  @Column('timestamptz') lastUsedAt: Date
  @Column('timestamptz') expiresAt: Date
  @Column('timestamptz', { nullable: true }) endedAt: Date | null
}
