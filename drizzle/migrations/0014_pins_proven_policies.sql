DO $$
DECLARE t text;
BEGIN
  FOREACH t IN ARRAY ARRAY['pin_events', 'start_pins', 'guess_alarms'] LOOP
    EXECUTE format('ALTER TABLE public.%I ENABLE ROW LEVEL SECURITY', t);
    EXECUTE format('ALTER TABLE public.%I FORCE ROW LEVEL SECURITY', t);
    EXECUTE format($p$CREATE POLICY own_organisation ON public.%I USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid)$p$, t);
    EXECUTE format('GRANT SELECT, INSERT ON public.%I TO kneeboard_app', t);
  END LOOP;
END $$;
--> statement-breakpoint
GRANT UPDATE, DELETE ON start_pins TO kneeboard_app;
--> statement-breakpoint
GRANT UPDATE ON guess_alarms TO kneeboard_app;
--> statement-breakpoint
CREATE TRIGGER append_only BEFORE UPDATE OR DELETE ON pin_events FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER append_only_whole BEFORE TRUNCATE ON pin_events FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
-- A PIN of before counts as proven where a lead had witnessed it; the others are marked until they are set again. The owner is under the policy too, so it is lifted for this one statement.
ALTER TABLE pins NO FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
UPDATE pins SET proof = 'lead' WHERE witness_person_id IS NOT NULL;
--> statement-breakpoint
ALTER TABLE pins FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
-- How often and from how many addresses somebody guessed at one account in the last hour: what its owner is told.
CREATE FUNCTION door_guesses(account text) RETURNS TABLE (failures integer, addresses integer)
LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
  SELECT coalesce(max(a.failures) FILTER (WHERE a.key = 'account ' || account), 0)::integer, (count(*) FILTER (WHERE starts_with(a.key, 'account ' || account || ' from ')))::integer
    FROM attempts a WHERE starts_with(a.key, 'account ' || account) AND a.last_failure_at > clock_timestamp() - interval '1 hour'
$$;
--> statement-breakpoint
REVOKE ALL ON FUNCTION door_guesses(text) FROM PUBLIC;
--> statement-breakpoint
GRANT EXECUTE ON FUNCTION door_guesses(text) TO kneeboard_app;
