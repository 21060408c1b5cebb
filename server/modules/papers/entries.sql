-- Every entry of the ledger with its posting, oldest first, in the order of the columns of the export.
-- $1 company, $2 first day or null, $3 last day or null
select p.id, p.kind, p.occurred_on::text, to_char(p.occurred_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"'),
       to_char(p.recorded_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"'), e.refrigerant, e.line::text, a.kind,
       coalesce(ec.number, concat_ws(' ', es.tag, ei.name), ep.name, ''), e.account_id,
       trim_scale(e.mass_kg)::text, round(e.mass_kg / 0.45359237, 4)::text,
       person.name, si.name, concat_ws(' ', sy.tag, ci.name), cy.number, tc.number, pa.name, p.purpose, p.part, p.work_done, p.note, p.reverses_id, p.reason,
       encode(p.content_hash, 'hex')
  from posting p
  join entry e on e.company_id = p.company_id and e.posting_id = p.id
  join account a on a.company_id = e.company_id and a.id = e.account_id
  join person on person.company_id = p.company_id and person.id = p.person_id
  left join cylinder ec on ec.company_id = e.company_id and ec.id = e.account_id
  left join circuit ei on ei.company_id = e.company_id and ei.id = e.account_id
  left join system es on es.company_id = ei.company_id and es.id = ei.system_id
  left join partner ep on ep.company_id = e.company_id and ep.id = e.account_id
  left join site si on si.company_id = p.company_id and si.id = p.site_id
  left join circuit ci on ci.company_id = p.company_id and ci.id = p.circuit_id
  left join system sy on sy.company_id = ci.company_id and sy.id = ci.system_id
  left join cylinder cy on cy.company_id = p.company_id and cy.id = p.cylinder_id
  left join cylinder tc on tc.company_id = p.company_id and tc.id = p.to_cylinder_id
  left join partner pa on pa.company_id = p.company_id and pa.id = p.partner_id
 where p.company_id = $1 and ($2::date is null or p.occurred_on >= $2::date) and ($3::date is null or p.occurred_on <= $3::date)
 order by p.occurred_at, p.id, e.line
