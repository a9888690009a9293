-- What stands in the audit table stays as it is, whoever tries: the application's role has no right to change
-- it (granted after every migration, see server/db/grants.ts), and this trigger refuses it to any role.
CREATE FUNCTION refuse_audit_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION 'rows of the audit table are never changed' USING ERRCODE = 'insufficient_privilege';
END
$$;
--> statement-breakpoint
CREATE TRIGGER audit_unchanged BEFORE UPDATE OR DELETE OR TRUNCATE ON audit
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_audit_change();
--> statement-breakpoint

-- A reader of run_events goes on from the last id it has seen, so a lower id must never become visible after a
-- higher one. Ids are given when rows are made, rows are seen when their transaction ends: whoever adds events
-- holds a lock from before the first id until then. A statement's trigger runs before its first row is made.
CREATE FUNCTION order_run_events() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  PERFORM pg_advisory_xact_lock(hashtextextended('run_events', 0));
  RETURN NULL;
END
$$;
--> statement-breakpoint
CREATE TRIGGER run_events_ordered BEFORE INSERT ON run_events
  FOR EACH STATEMENT EXECUTE FUNCTION order_run_events();
--> statement-breakpoint
CREATE FUNCTION announce_run_events() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  PERFORM pg_notify('run_events', '');
  RETURN NULL;
END
$$;
--> statement-breakpoint
CREATE TRIGGER run_events_announced AFTER INSERT ON run_events
  FOR EACH STATEMENT EXECUTE FUNCTION announce_run_events();
