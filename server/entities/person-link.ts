import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('person_link')
export class PersonLink {
  @PrimaryColumn('uuid') companyId: string
  @PrimaryColumn('uuid') id: string
  @Column('uuid') personId: string
  @Column('text') purpose: string
  @Column('bytea') tokenHash: Buffer
  @Column('timestamptz') expiresAt: Date
  @Column('timestamptz', { nullable: true }) usedAt: Date | null
}
