import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('leak')
export class Leak {
  @PrimaryColumn('uuid') companyId: string
  @PrimaryColumn('uuid') id: string
  @Column('uuid') customerId: string
  @Column('uuid') circuitId: string
  @Column('uuid', { nullable: true }) componentId: string | null
  @Column('date') foundOn: string
  @Column('text') cause: string
  @Column('text') method: string
  @Column('text', { nullable: true }) position: string | null
  @Column('text', { nullable: true }) note: string | null
  @Column('uuid') personId: string
  @Column('date', { nullable: true }) repairedOn: string | null
  @Column('text', { nullable: true }) repair: string | null
}
