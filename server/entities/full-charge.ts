import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('full_charge')
export class FullCharge {
  @PrimaryColumn('uuid') companyId: string
  @PrimaryColumn('uuid') id: string
  @Column('uuid') customerId: string
  @Column('uuid') circuitId: string
  @Column('text') method: string
  @Column('numeric', { precision: 24, scale: 14 }) massKg: string
  @Column('numeric', { precision: 24, scale: 14, nullable: true }) rangeLowKg: string | null
  @Column('numeric', { precision: 24, scale: 14, nullable: true }) rangeHighKg: string | null
  @Column('date') effectiveOn: string
  @Column('text', { nullable: true }) note: string | null
  @Column('uuid') personId: string
  @Column('timestamptz', { default: () => 'clock_timestamp()' }) recordedAt: Date
}
