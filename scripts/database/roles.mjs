/**
 * Makes the two roles and the database where they are missing: the owner, who migrates, and the application,
 * which neither owns a table nor bypasses row security.
 *
 * @param admin  superuser address
 * @returns the addresses of both roles in the database
 */
export async function ensureRoles(admin, { ownerPassword, appPassword, database = 'weighback' }) {
  const { default: pg } = await import('pg')
  const client = new pg.Client({ connectionString: admin })
  await client.connect()
  try {
    for (const [role, password] of [['weighback_owner', ownerPassword], ['weighback_app', appPassword]]) {
      const { rowCount } = await client.query('select from pg_roles where rolname = $1', [role])
      await client.query(`${rowCount ? 'alter' : 'create'} role ${role} login nosuperuser nobypassrls nocreatedb nocreaterole password ${client.escapeLiteral(password)}`)
    }
    const { rowCount } = await client.query('select from pg_database where datname = $1', [database])
    if (!rowCount) await client.query(`create database ${database} owner weighback_owner`)
  } finally {
    await client.end()
  }
  const at = (user, password) => Object.assign(new URL(admin), { username: user, password, pathname: `/${database}` }).href
  return { ownerUrl: at('weighback_owner', ownerPassword), appUrl: at('weighback_app', appPassword) }
}
