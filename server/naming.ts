import { DefaultNamingStrategy } from 'typeorm'

/** `fullChargeKg` in code is `full_charge_kg` in the database. */
export class SnakeCaseColumns extends DefaultNamingStrategy {
  override columnName(propertyName: string, customName: string | undefined): string {
    return customName ?? propertyName.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`)
  }
}
