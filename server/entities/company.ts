import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('company')
export class Company {
  @PrimaryColumn('uuid') id: string
  @Column('text') name: string
  @Column('boolean') isDemo: boolean
  @Column('text') massUnit: string
  @Column('timestamptz') createdAt: Date
}
