import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('site')
export class Site {
  @PrimaryColumn('uuid') companyId: string
  @PrimaryColumn('uuid') id: string
  @Column('uuid') customerId: string
  @Column('text') name: string
  @Column('text') street: string
  @Column('text') city: string
  @Column('text', { nullable: true }) region: string | null
  @Column('text', { nullable: true }) postalCode: string | null
  @Column('text') country: string
  @Column('text') timeZone: string
  @Column('integer') elevationM: number
  @Column('text') jurisdiction: string
  @Column('text') leakRateMethod: string
  @Column('text', { array: true }) rulePacks: string[]
  @Column('integer') version: number
}
