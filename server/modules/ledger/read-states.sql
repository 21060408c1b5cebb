-- Everything a posting is decided by, after its accounts are locked. One row; what a draft does not name is null.
-- $1 company, $2 posting, $3 cylinder, $4 receiving cylinder, $5 circuit, $6 partner, $7 visit, $8 leak, $9 date of the event
select known.content_hash as known_hash,
       cy.id as cylinder_id, cy.number as cylinder_number, cy.refrigerant as cylinder_refrigerant, cy.kind as cylinder_kind,
       cy.contents as cylinder_contents, cy.tare_kg as cylinder_tare_kg, cy.water_capacity_kg as cylinder_water_capacity_kg,
       cy.test_due_on as cylinder_test_due_on, cy.owner_customer_id as cylinder_owner_customer_id, cy.status as cylinder_status,
       coalesce(cb.mass_kg, 0) as cylinder_content_kg,
       tc.id as to_cylinder_id, tc.number as to_cylinder_number, tc.refrigerant as to_cylinder_refrigerant, tc.kind as to_cylinder_kind,
       tc.contents as to_cylinder_contents, tc.tare_kg as to_cylinder_tare_kg, tc.water_capacity_kg as to_cylinder_water_capacity_kg,
       tc.test_due_on as to_cylinder_test_due_on, tc.owner_customer_id as to_cylinder_owner_customer_id, tc.status as to_cylinder_status,
       coalesce(tb.mass_kg, 0) as to_cylinder_content_kg,
       ci.id as circuit_id, ci.refrigerant as circuit_refrigerant, ci.status as circuit_status, ci.customer_id as circuit_customer_id,
       ci.site_id as circuit_site_id, si.time_zone as circuit_time_zone, coalesce(ib.mass_kg, 0) as circuit_book_kg, fc.mass_kg as circuit_full_charge_kg,
       pa.id as partner_id, pa.kind as partner_kind,
       vi.id as visit_id, vi.site_id as visit_site_id,
       le.id as leak_id, le.circuit_id as leak_circuit_id
  from (select $1::uuid as company_id) as one
  left join posting known on known.company_id = one.company_id and known.id = $2
  left join cylinder cy on cy.company_id = one.company_id and cy.id = $3
  left join balance cb on cb.company_id = one.company_id and cb.account_id = cy.id and cb.refrigerant = cy.refrigerant
  left join cylinder tc on tc.company_id = one.company_id and tc.id = $4
  left join balance tb on tb.company_id = one.company_id and tb.account_id = tc.id and tb.refrigerant = tc.refrigerant
  left join circuit ci on ci.company_id = one.company_id and ci.id = $5
  left join site si on si.company_id = one.company_id and si.id = ci.site_id
  left join balance ib on ib.company_id = one.company_id and ib.account_id = ci.id and ib.refrigerant = ci.refrigerant
  left join lateral (
    select mass_kg from full_charge
     where company_id = one.company_id and circuit_id = ci.id and effective_on <= $9::date
     order by effective_on desc, recorded_at desc limit 1
  ) fc on true
  left join partner pa on pa.company_id = one.company_id and pa.id = $6
  left join visit vi on vi.company_id = one.company_id and vi.id = $7
  left join leak le on le.company_id = one.company_id and le.id = $8
