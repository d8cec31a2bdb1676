-- The app's role may read and write rows, never define anything, and may only add to the record.
-- The migrating connection names that role in spinward.app_role; where it is the owner itself (one role for
-- everything) there is nothing to grant and the trigger below is what holds.
DO $$
DECLARE
  app text := nullif(current_setting('spinward.app_role', true), '');
BEGIN
  IF app IS NULL OR app = current_user THEN
    RETURN;
  END IF;
  EXECUTE format('GRANT USAGE ON SCHEMA public TO %I', app);
  EXECUTE format('GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA public TO %I', app);
  EXECUTE format('GRANT USAGE, SELECT ON ALL SEQUENCES IN SCHEMA public TO %I', app);
  EXECUTE format('ALTER DEFAULT PRIVILEGES IN SCHEMA public GRANT SELECT, INSERT, UPDATE, DELETE ON TABLES TO %I', app);
  EXECUTE format('ALTER DEFAULT PRIVILEGES IN SCHEMA public GRANT USAGE, SELECT ON SEQUENCES TO %I', app);
  EXECUTE format('REVOKE UPDATE, DELETE, TRUNCATE ON public.record FROM %I', app);
  EXECUTE format('REVOKE DELETE ON public."user" FROM %I', app);
END
$$;
--> statement-breakpoint
CREATE FUNCTION refuse_record_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION 'the record is append-only' USING ERRCODE = 'restrict_violation';
END
$$;
--> statement-breakpoint
CREATE TRIGGER record_append_only BEFORE UPDATE OR DELETE OR TRUNCATE ON record
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_record_change();
--> statement-breakpoint
-- Whoever listens learns of every change once a statement and study, however many rows it wrote. Ids only:
-- a notification carries at most 8 kB.
CREATE FUNCTION announce_record() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  PERFORM pg_notify('spinward_record', json_build_object(
    'id', max(id), 'studyId', study_id, 'revision', max(revision), 'userId', max(user_id),
    'objects', array_agg(DISTINCT object))::text)
  FROM added WHERE study_id IS NOT NULL GROUP BY study_id;
  RETURN NULL;
END
$$;
--> statement-breakpoint
CREATE TRIGGER record_announced AFTER INSERT ON record
  REFERENCING NEW TABLE AS added
  FOR EACH STATEMENT EXECUTE FUNCTION announce_record();
