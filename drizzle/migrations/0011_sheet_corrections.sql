CREATE TABLE "sheet_corrections" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"revision_id" uuid NOT NULL,
	"field" text NOT NULL,
	"kind" text NOT NULL,
	"label" text,
	"place" text,
	"is_day_first" boolean,
	"read_value" text,
	"value" text NOT NULL,
	"supplier" text NOT NULL,
	"read_supplier" text,
	"language" text,
	"heading" text NOT NULL,
	"corrected_at" timestamp with time zone NOT NULL,
	"corrected_by" uuid NOT NULL,
	CONSTRAINT "sheet_corrections_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "sheet_corrections" ADD CONSTRAINT "sheet_corrections_organisation_id_revision_id_revisions_organisation_id_id_fk" FOREIGN KEY ("organisation_id","revision_id") REFERENCES "public"."revisions"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sheet_corrections" ADD CONSTRAINT "sheet_corrections_organisation_id_corrected_by_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","corrected_by") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "sheet_corrections_once" ON "sheet_corrections" USING btree ("organisation_id","revision_id","field");--> statement-breakpoint
CREATE INDEX "sheet_corrections_by_time" ON "sheet_corrections" USING btree ("organisation_id","corrected_at","id");