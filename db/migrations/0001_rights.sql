-- What the generator does not write: who may touch what, that no owner slips past the policies, and that the
-- tables of record only ever grow.
GRANT USAGE ON SCHEMA public TO app_user;
--> statement-breakpoint
GRANT SELECT, INSERT ON
  audit, edition_costs, editions, ledger, offers, pages, scheme_history, signatures, surveys, webhook_events
TO app_user;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON
  change_orders, companies, draws, guests, invitations, jobs, members, payments, people, schemes
TO app_user;
--> statement-breakpoint
-- A schedule of payments is drawn up anew when the sum changes; nothing else is ever removed.
GRANT DELETE ON draws TO app_user;
--> statement-breakpoint
ALTER TABLE audit FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE change_orders FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE companies FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE draws FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE edition_costs FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE editions FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE guests FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE invitations FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE jobs FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE ledger FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE members FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE offers FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE pages FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE payments FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE people FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE scheme_history FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE schemes FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE signatures FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE surveys FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE webhook_events FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION 'Rows of % are never changed or removed.', tg_table_name USING ERRCODE = 'restrict_violation';
END
$$;
--> statement-breakpoint
-- For each statement, not row: refused even where the policies would have shown no row.
CREATE TRIGGER audit_append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON audit
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER edition_costs_append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON edition_costs
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER editions_append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON editions
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER ledger_append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON ledger
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER offers_append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON offers
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER pages_append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON pages
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER scheme_history_append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON scheme_history
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER signatures_append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON signatures
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER surveys_append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON surveys
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER webhook_events_append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON webhook_events
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
