ALTER TABLE sheet_corrections ENABLE ROW LEVEL SECURITY;
--> statement-breakpoint
ALTER TABLE sheet_corrections FORCE ROW LEVEL SECURITY;
--> statement-breakpoint
CREATE POLICY own_organisation ON sheet_corrections USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid);
--> statement-breakpoint
GRANT SELECT, INSERT, DELETE ON sheet_corrections TO kneeboard_app;
