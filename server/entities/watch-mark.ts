import { Column, Entity, PrimaryColumn } from 'typeorm'

@Entity('watch_mark')
export class WatchMark {
  @PrimaryColumn('uuid') companyId: string
  @PrimaryColumn('uuid') id: string
  @Column('uuid') customerId: string
  @Column('uuid') circuitId: string
  @Column('uuid', { nullable: true }) componentId: string | null
  @Column('text') text: string
  @Column('date') markedOn: string
  @Column('uuid') personId: string
  @Column('date', { nullable: true }) resolvedOn: string | null
}
