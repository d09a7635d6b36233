-- Organisations are apart by policy: every table but the door tables, forced, so that even the owner is under it.
-- After COMMIT the setting reads '' and not NULL, hence nullif.
DO $$
DECLARE t text;
BEGIN
  FOR t IN SELECT tablename FROM pg_tables WHERE schemaname = 'public' AND tablename NOT IN ('logins', 'tablet_keys', 'attempts', 'sessions') LOOP
    EXECUTE format('ALTER TABLE public.%I ENABLE ROW LEVEL SECURITY', t);
    EXECUTE format('ALTER TABLE public.%I FORCE ROW LEVEL SECURITY', t);
    EXECUTE format($p$CREATE POLICY own_organisation ON public.%I USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid)$p$, t);
  END LOOP;
END $$;
--> statement-breakpoint
-- Nothing a person signed is ever changed, removed or emptied: not by the service, not by mistake, not by the owner without dropping a trigger.
CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql SET search_path = pg_catalog AS $$
BEGIN
  RAISE EXCEPTION '% is append-only: % refused', TG_TABLE_NAME, TG_OP USING ERRCODE = 'restrict_violation', HINT = 'Write a new row that corrects the old one.';
END $$;
--> statement-breakpoint
DO $$
DECLARE t text;
BEGIN
  FOREACH t IN ARRAY ARRAY['deliveries', 'delivery_outcomes', 'checklist_versions', 'checklist_texts', 'checklist_people', 'answer_sets', 'acknowledgements', 'exposure_bases', 'recordlog_entries', 'recordlog_records', 'recordlog_checkpoints'] LOOP
    EXECUTE format('CREATE TRIGGER append_only BEFORE UPDATE OR DELETE ON public.%I FOR EACH ROW EXECUTE FUNCTION refuse_change()', t);
    EXECUTE format('CREATE TRIGGER append_only_whole BEFORE TRUNCATE ON public.%I FOR EACH STATEMENT EXECUTE FUNCTION refuse_change()', t);
    EXECUTE format('GRANT SELECT, INSERT ON public.%I TO kneeboard_app', t);
  END LOOP;
  FOREACH t IN ARRAY ARRAY['organisations', 'people', 'tablets', 'products', 'revisions', 'kits', 'equipment', 'jobs', 'shifts', 'corrective_actions', 'recordlog_heads'] LOOP
    EXECUTE format('GRANT SELECT, INSERT, UPDATE ON public.%I TO kneeboard_app', t);
  END LOOP;
  FOREACH t IN ARRAY ARRAY['pins', 'kit_parts', 'shift_people', 'shift_kits', 'shift_equipment', 'sessions'] LOOP
    EXECUTE format('GRANT SELECT, INSERT, UPDATE, DELETE ON public.%I TO kneeboard_app', t);
  END LOOP;
END $$;
--> statement-breakpoint
-- The door: reached only through these functions, each of which gives one answer to one question.
CREATE FUNCTION scope() RETURNS uuid LANGUAGE sql STABLE SET search_path = pg_catalog AS $$ SELECT nullif(current_setting('app.organisation', true), '')::uuid $$;
--> statement-breakpoint
CREATE FUNCTION door_find_login(wanted text) RETURNS TABLE (organisation_id uuid, person_id uuid, password_hash text)
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
  SELECT l.organisation_id, l.person_id, l.password_hash FROM logins l WHERE l.email = lower(wanted)
$$;
--> statement-breakpoint
CREATE FUNCTION door_member(person uuid) RETURNS TABLE (email text, role text, password_hash text, sessions_valid_from timestamptz)
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
  SELECT l.email, l.role, l.password_hash, l.sessions_valid_from FROM logins l WHERE l.person_id = person AND l.organisation_id = scope()
$$;
--> statement-breakpoint
CREATE FUNCTION door_members() RETURNS TABLE (person_id uuid, email text, role text)
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
  SELECT l.person_id, l.email, l.role FROM logins l WHERE l.organisation_id = scope()
$$;
--> statement-breakpoint
-- Makes or changes a sign-in of the organisation in scope; ends its sessions. 'taken' when the address belongs to another person.
CREATE FUNCTION door_set_login(person uuid, new_email text, new_role text, new_hash text) RETURNS text
LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
BEGIN
  IF scope() IS NULL THEN RAISE EXCEPTION 'no organisation in scope'; END IF;
  IF EXISTS (SELECT 1 FROM logins l WHERE l.email = lower(new_email) AND (l.organisation_id, l.person_id) IS DISTINCT FROM (scope(), person)) THEN RETURN 'taken'; END IF;
  UPDATE logins l SET email = lower(new_email), role = new_role, password_hash = coalesce(new_hash, l.password_hash), sessions_valid_from = clock_timestamp()
    WHERE l.organisation_id = scope() AND l.person_id = person;
  IF FOUND THEN RETURN 'changed'; END IF;
  IF new_hash IS NULL THEN RETURN 'password-missing'; END IF;
  INSERT INTO logins (email, organisation_id, person_id, role, password_hash) VALUES (lower(new_email), scope(), person, new_role, new_hash);
  RETURN 'made';
END $$;
--> statement-breakpoint
CREATE FUNCTION door_remove_login(person uuid) RETURNS void
LANGUAGE sql SECURITY DEFINER SET search_path = public, pg_temp AS $$
  DELETE FROM logins l WHERE l.organisation_id = scope() AND l.person_id = person
$$;
--> statement-breakpoint
CREATE FUNCTION door_set_password(person uuid, new_hash text) RETURNS timestamptz
LANGUAGE sql SECURITY DEFINER SET search_path = public, pg_temp AS $$
  UPDATE logins l SET password_hash = new_hash, sessions_valid_from = clock_timestamp() WHERE l.organisation_id = scope() AND l.person_id = person RETURNING sessions_valid_from
$$;
--> statement-breakpoint
CREATE FUNCTION door_offer_pairing(tablet uuid, code_hash bytea, good_until timestamptz) RETURNS void
LANGUAGE sql SECURITY DEFINER SET search_path = public, pg_temp AS $$
  INSERT INTO tablet_keys (tablet_id, organisation_id, pairing_hash, pairing_expires_at)
    SELECT tablet, scope(), code_hash, good_until WHERE scope() IS NOT NULL
  ON CONFLICT (tablet_id) DO UPDATE SET pairing_hash = excluded.pairing_hash, pairing_expires_at = excluded.pairing_expires_at
    WHERE tablet_keys.organisation_id = scope()
$$;
--> statement-breakpoint
-- A code works once: the row loses it in the same statement that finds it.
CREATE FUNCTION door_pair(code_hash bytea, new_token_hash bytea, asked_at timestamptz) RETURNS TABLE (organisation_id uuid, tablet_id uuid)
LANGUAGE sql SECURITY DEFINER SET search_path = public, pg_temp AS $$
  UPDATE tablet_keys k SET pairing_hash = NULL, pairing_expires_at = NULL, token_hash = new_token_hash
    WHERE k.pairing_hash = code_hash AND k.pairing_expires_at > asked_at RETURNING k.organisation_id, k.tablet_id
$$;
--> statement-breakpoint
CREATE FUNCTION door_tablet(token bytea) RETURNS TABLE (organisation_id uuid, tablet_id uuid)
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
  SELECT k.organisation_id, k.tablet_id FROM tablet_keys k WHERE k.token_hash = token
$$;
--> statement-breakpoint
CREATE FUNCTION door_withdraw_tablet(tablet uuid) RETURNS void
LANGUAGE sql SECURITY DEFINER SET search_path = public, pg_temp AS $$
  DELETE FROM tablet_keys k WHERE k.tablet_id = tablet AND k.organisation_id = scope()
$$;
--> statement-breakpoint
-- Seconds to wait before the next guess at this key: none up to `free` failures, then doubling to 15 minutes; forgotten after an hour.
CREATE FUNCTION door_wait(guessed text, free integer) RETURNS integer
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
  SELECT greatest(0, ceil(least(900, power(2, least(a.failures - free, 20))) - extract(epoch FROM clock_timestamp() - a.last_failure_at)))::integer
    FROM attempts a WHERE a.key = guessed AND a.failures > free AND a.last_failure_at > clock_timestamp() - interval '1 hour'
$$;
--> statement-breakpoint
CREATE FUNCTION door_failed(guessed text) RETURNS integer
LANGUAGE sql SECURITY DEFINER SET search_path = public, pg_temp AS $$
  INSERT INTO attempts AS a (key, failures, last_failure_at) VALUES (guessed, 1, clock_timestamp())
  ON CONFLICT (key) DO UPDATE SET failures = CASE WHEN a.last_failure_at < clock_timestamp() - interval '1 hour' THEN 1 ELSE a.failures + 1 END, last_failure_at = clock_timestamp()
  RETURNING failures
$$;
--> statement-breakpoint
CREATE FUNCTION door_succeeded(guessed text) RETURNS void
LANGUAGE sql SECURITY DEFINER SET search_path = public, pg_temp AS $$ DELETE FROM attempts a WHERE a.key = guessed $$;
--> statement-breakpoint
-- For background work that serves every organisation (checkpoints): ids only.
CREATE FUNCTION door_organisations() RETURNS SETOF uuid
LANGUAGE plpgsql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
BEGIN
  RETURN QUERY SELECT DISTINCT l.organisation_id FROM logins l;
END $$;
--> statement-breakpoint
DO $$
DECLARE f text;
BEGIN
  FOR f IN SELECT p.oid::regprocedure::text FROM pg_proc p JOIN pg_namespace n ON n.oid = p.pronamespace WHERE n.nspname = 'public' AND (p.proname LIKE 'door\_%' OR p.proname = 'scope') LOOP
    EXECUTE format('REVOKE ALL ON FUNCTION %s FROM PUBLIC', f);
    EXECUTE format('GRANT EXECUTE ON FUNCTION %s TO kneeboard_app', f);
  END LOOP;
END $$;
--> statement-breakpoint
GRANT USAGE ON SCHEMA public TO kneeboard_app;
--> statement-breakpoint
REVOKE CREATE ON SCHEMA public FROM PUBLIC;
