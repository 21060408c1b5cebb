import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('customer')
export class Customer {
  @PrimaryColumn('uuid') companyId: string
  @PrimaryColumn('uuid') id: string
  @Column('text') name: string
  @Column('text', { nullable: true }) contactName: string | null
  @Column('text', { nullable: true }) email: string | null
  @Column('text', { nullable: true }) phone: string | null
  @Column('text', { nullable: true }) address: string | null
  @Column('text', { nullable: true }) note: string | null
  @Column('integer') version: number
}
