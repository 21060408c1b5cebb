import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('component')
export class Component {
  @PrimaryColumn('uuid') companyId: string
  @PrimaryColumn('uuid') id: string
  @Column('uuid') customerId: string
  @Column('uuid') circuitId: string
  @Column('text') kind: string
  @Column('text') name: string
  @Column('text', { nullable: true }) position: string | null
}
