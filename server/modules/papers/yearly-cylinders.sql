-- The yearly cylinder ledger: one row per refrigerant and cylinder that held or moved anything in the year.
-- A reversal counts in the column of what it takes back, so it is read with the original's kind and direction.
-- $1 company, $2 first day of the year, $3 last day
with movement as (
  select e.account_id, e.refrigerant, e.mass_kg, p.occurred_on >= $2::date as is_in_year, coalesce(o.kind, p.kind) as kind,
         (case when o.id is null then e.mass_kg else -e.mass_kg end) > 0 as is_receiving
    from entry e
    join posting p on p.company_id = e.company_id and p.id = e.posting_id
    left join posting o on o.company_id = p.company_id and o.id = p.reverses_id
   where e.company_id = $1 and p.occurred_on <= $3::date
)
select m.refrigerant, cy.number as "cylinderNumber",
       trim_scale(coalesce(sum(m.mass_kg) filter (where not m.is_in_year), 0))::text as "openingKg",
       trim_scale(coalesce(sum(m.mass_kg) filter (where m.is_in_year and m.kind = 'purchase'), 0))::text as "boughtKg",
       trim_scale(coalesce(sum(m.mass_kg) filter (where m.is_in_year and m.kind = 'recovery'), 0))::text as "recoveredKg",
       trim_scale(coalesce(sum(m.mass_kg) filter (where m.is_in_year and m.kind = 'receipt'), 0))::text as "receivedKg",
       trim_scale(coalesce(sum(m.mass_kg) filter (where m.is_in_year and m.kind = 'transfer' and m.is_receiving), 0))::text as "transferredInKg",
       trim_scale(coalesce(sum(m.mass_kg) filter (where m.is_in_year and m.kind = 'opening-stock'), 0))::text as "takenUpKg",
       trim_scale(coalesce(-sum(m.mass_kg) filter (where m.is_in_year and m.kind = 'charge'), 0))::text as "chargedKg",
       trim_scale(coalesce(-sum(m.mass_kg) filter (where m.is_in_year and m.kind = 'return'), 0))::text as "returnedKg",
       trim_scale(coalesce(-sum(m.mass_kg) filter (where m.is_in_year and m.kind = 'reclaim'), 0))::text as "reclaimedKg",
       trim_scale(coalesce(-sum(m.mass_kg) filter (where m.is_in_year and m.kind = 'destruction'), 0))::text as "destroyedKg",
       trim_scale(coalesce(-sum(m.mass_kg) filter (where m.is_in_year and m.kind = 'transfer' and not m.is_receiving), 0))::text as "transferredOutKg",
       trim_scale(coalesce(sum(m.mass_kg) filter (where m.is_in_year and m.kind = 'variance'), 0))::text as "varianceKg",
       trim_scale(sum(m.mass_kg))::text as "closingKg"
  from movement m
  join cylinder cy on cy.company_id = $1 and cy.id = m.account_id
 group by m.refrigerant, cy.id, cy.number
having bool_or(m.is_in_year) or sum(m.mass_kg) <> 0
 order by m.refrigerant collate "C", lower(cy.number) collate "C", cy.id
