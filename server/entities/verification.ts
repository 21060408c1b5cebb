import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('verification')
export class Verification {
  @PrimaryColumn('uuid') companyId: string
  @PrimaryColumn('uuid') id: string
  @Column('uuid') customerId: string
  @Column('uuid') circuitId: string
  @Column('uuid', { nullable: true }) leakId: string | null
  @Column('text') kind: string
  @Column('date') testedOn: string
  @Column('text') type: string
  @Column('boolean') passed: boolean
  @Column('boolean') showsAllRepaired: boolean
  @Column('text', { nullable: true }) note: string | null
  @Column('uuid') personId: string
  @Column('timestamptz', { default: () => 'clock_timestamp()' }) recordedAt: Date
}
