-- Writes a posting, its entries and the balances it moves, in one statement. Writes nothing where the id is known.
-- $1 company, $2 the posting, $3 its entries in order, $4 person, $5 hash of what the person sent
with draft as (
  select * from jsonb_to_record($2::jsonb) as d (
    id uuid, kind text, "occurredOn" date, "occurredAt" timestamptz, refrigerant text, "massKg" numeric, entered jsonb,
    "cylinderId" uuid, "toCylinderId" uuid, "circuitId" uuid, "partnerId" uuid, "siteId" uuid, "customerId" uuid, "visitId" uuid, "leakId" uuid,
    purpose text, "isComplete" boolean, part text, "workDone" text, note text, "reversesId" uuid, reason text)
), line as (
  select * from jsonb_to_recordset($3::jsonb) as e (line smallint, "accountKind" text, "accountId" uuid, refrigerant text, "massKg" numeric)
), written as (
  insert into posting (
    company_id, id, kind, occurred_on, occurred_at, person_id, refrigerant, mass_kg, entered, cylinder_id, to_cylinder_id, circuit_id, partner_id,
    site_id, customer_id, visit_id, leak_id, purpose, is_complete, part, work_done, note, reverses_id, reason, content_hash)
  select $1, id, kind, "occurredOn", "occurredAt", $4, refrigerant, "massKg", entered, "cylinderId", "toCylinderId", "circuitId", "partnerId",
         "siteId", "customerId", "visitId", "leakId", purpose, "isComplete", part, "workDone", note, "reversesId", reason, $5
    from draft
  on conflict (company_id, id) do nothing
  returning id, customer_id
), account_of_line as (
  select line.line, line.refrigerant, line."massKg" as mass_kg, written.id as posting_id, written.customer_id, account.id as account_id, account.kind
    from written, line
    join account on account.company_id = $1
     and (account.id = line."accountId" or (line."accountId" is null and account.kind = line."accountKind"))
), entries as (
  insert into entry (company_id, posting_id, line, account_id, refrigerant, mass_kg, customer_id)
  select $1, posting_id, line, account_id, refrigerant, mass_kg, customer_id from account_of_line
), moved as (
  select account_id, refrigerant, kind, sum(mass_kg) as mass_kg, (array_agg(customer_id))[1] as customer_id
    from account_of_line where kind in ('cylinder', 'circuit')
   group by account_id, refrigerant, kind
), balances as (
  -- the sum is made here and not in the update: a check also looks at the row that would have been inserted
  insert into balance (company_id, account_id, refrigerant, kind, mass_kg, customer_id)
  select $1, m.account_id, m.refrigerant, m.kind, m.mass_kg + coalesce(b.mass_kg, 0), case when m.kind = 'circuit' then m.customer_id end
    from moved m left join balance b on b.company_id = $1 and b.account_id = m.account_id and b.refrigerant = m.refrigerant
  on conflict (company_id, account_id, refrigerant) do update set mass_kg = excluded.mass_kg
)
select (select count(*) from written)::int as written, (select count(*) from account_of_line)::int as lines
