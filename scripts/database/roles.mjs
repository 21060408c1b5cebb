import { runSql } from './postgresql.mjs'

/**
 * Makes the database and its two roles where they are missing, and sets their passwords. The owner has the
 * tables and migrates; the application signs in as a role that owns nothing, so row security binds it.
 */
export async function ensureRoles({ programs, port, settings }) {
  const password = settings.superuserPassword
  await runSql({
    programs, port, password,
    sql: `
      ${ensureRole('weighback_owner', settings.ownerPassword)}
      ${ensureRole('weighback_app', settings.appPassword)}
      select 'create database weighback owner weighback_owner' where not exists (select from pg_database where datname = 'weighback') \\gexec
      revoke all on database weighback from public;
      grant connect on database weighback to weighback_app;
    `,
  })
}

const ensureRole = (name, password) => `
      select 'create role ${name}' where not exists (select from pg_roles where rolname = '${name}') \\gexec
      alter role ${name} login nosuperuser nocreatedb nocreaterole noreplication nobypassrls password '${password}';`
