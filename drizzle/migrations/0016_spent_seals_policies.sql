ALTER TABLE public.spent_seals ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE public.spent_seals FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY own_organisation ON public.spent_seals USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);
--> statement-breakpoint
GRANT SELECT, INSERT ON public.spent_seals TO kneeboard_app;
--> statement-breakpoint
CREATE TRIGGER append_only BEFORE UPDATE OR DELETE ON spent_seals FOR EACH ROW EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER append_only_whole BEFORE TRUNCATE ON spent_seals FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
