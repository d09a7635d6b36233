DO $$
DECLARE t text;
BEGIN
  FOREACH t IN ARRAY ARRAY['sheet_requests', 'product_uses', 'site_codes'] LOOP
    EXECUTE format('ALTER TABLE public.%I ENABLE ROW LEVEL SECURITY', t);
    EXECUTE format('ALTER TABLE public.%I FORCE ROW LEVEL SECURITY', t);
    EXECUTE format($p$CREATE POLICY own_organisation ON public.%I USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid)$p$, t);
    EXECUTE format('GRANT SELECT, INSERT ON public.%I TO kneeboard_app', t);
  END LOOP;
END $$;
--> statement-breakpoint
GRANT UPDATE ON sheet_requests, site_codes TO kneeboard_app;
--> statement-breakpoint
CREATE TRIGGER append_only BEFORE UPDATE OR DELETE ON product_uses FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER append_only_whole BEFORE TRUNCATE ON product_uses FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
-- One link a subject: a new one makes the older worthless.
CREATE FUNCTION door_make_link(link_kind text, subject uuid, hash bytea, good_until timestamptz) RETURNS void
LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
BEGIN
  IF scope() IS NULL THEN RAISE EXCEPTION 'no organisation in scope'; END IF;
  DELETE FROM link_keys k WHERE k.organisation_id = scope() AND k.kind = link_kind AND k.subject_id = subject;
  INSERT INTO link_keys (token_hash, kind, organisation_id, subject_id, expires_at) VALUES (hash, link_kind, scope(), subject, good_until);
END $$;
--> statement-breakpoint
CREATE FUNCTION door_find_link(link_kind text, hash bytea, asked_at timestamptz) RETURNS TABLE (organisation_id uuid, subject_id uuid)
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
  SELECT k.organisation_id, k.subject_id FROM link_keys k WHERE k.token_hash = hash AND k.kind = link_kind AND (k.expires_at IS NULL OR k.expires_at > asked_at)
$$;
--> statement-breakpoint
CREATE FUNCTION door_drop_link(link_kind text, subject uuid) RETURNS boolean
LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
BEGIN
  DELETE FROM link_keys k WHERE k.organisation_id = scope() AND k.kind = link_kind AND k.subject_id = subject;
  RETURN FOUND;
END $$;
--> statement-breakpoint
DO $$
DECLARE f text;
BEGIN
  FOR f IN SELECT p.oid::regprocedure::text FROM pg_proc p JOIN pg_namespace n ON n.oid = p.pronamespace WHERE n.nspname = 'public' AND p.proname IN ('door_make_link', 'door_find_link', 'door_drop_link') LOOP
    EXECUTE format('REVOKE ALL ON FUNCTION %s FROM PUBLIC', f);
    EXECUTE format('GRANT EXECUTE ON FUNCTION %s TO kneeboard_app', f);
  END LOOP;
END $$;
