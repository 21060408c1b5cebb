import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('cylinder')
export class Cylinder {
  @PrimaryColumn('uuid') companyId: string
  @PrimaryColumn('uuid') id: string
  @Column('text') number: string
  @Column('text') kind: string
  @Column('text') refrigerant: string
  @Column('text') contents: string
  @Column('numeric', { precision: 24, scale: 14 }) tareKg: string
  @Column('numeric', { precision: 24, scale: 14, nullable: true }) waterCapacityKg: string | null
  @Column('date', { nullable: true }) testDueOn: string | null
  @Column('text') status: string
  @Column('uuid', { nullable: true }) holderId: string | null
  @Column('text', { nullable: true }) place: string | null
  @Column('uuid', { nullable: true }) ownerCustomerId: string | null
  @Column('integer') version: number
}
