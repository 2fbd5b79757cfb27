-- The least strain that any plan can have with the same day plan, groups of these sizes and this crew:
-- how far from the best the plan can be. Empty where the plan breaks a rule, or was written before.
alter table plan add column least_strain numeric(24, 9);
