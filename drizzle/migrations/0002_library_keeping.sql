CREATE TABLE "link_keys" (
	"token_hash" "bytea" PRIMARY KEY NOT NULL,
	"kind" text NOT NULL,
	"organisation_id" uuid NOT NULL,
	"subject_id" uuid NOT NULL,
	"expires_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "product_uses" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"product_id" uuid NOT NULL,
	"product_name" text NOT NULL,
	"revision_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"job_name" text NOT NULL,
	"site_name" text NOT NULL,
	"shift_id" uuid NOT NULL,
	"used_on" date NOT NULL,
	CONSTRAINT "product_uses_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
CREATE TABLE "sheet_requests" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"product_id" uuid NOT NULL,
	"email" text NOT NULL,
	"message" text NOT NULL,
	"language" text NOT NULL,
	"asked_at" timestamp with time zone NOT NULL,
	"asked_by" uuid NOT NULL,
	"mailed_at" timestamp with time zone,
	"expires_at" timestamp with time zone NOT NULL,
	"withdrawn_at" timestamp with time zone,
	"answered_at" timestamp with time zone,
	"revision_id" uuid,
	CONSTRAINT "sheet_requests_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
CREATE TABLE "site_codes" (
	"organisation_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"made_at" timestamp with time zone NOT NULL,
	"made_by" uuid NOT NULL,
	"revoked_at" timestamp with time zone,
	CONSTRAINT "site_codes_organisation_id_job_id_pk" PRIMARY KEY("organisation_id","job_id")
);
--> statement-breakpoint
ALTER TABLE "product_uses" ADD CONSTRAINT "product_uses_organisation_id_product_id_products_organisation_id_id_fk" FOREIGN KEY ("organisation_id","product_id") REFERENCES "public"."products"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "product_uses" ADD CONSTRAINT "product_uses_organisation_id_revision_id_revisions_organisation_id_id_fk" FOREIGN KEY ("organisation_id","revision_id") REFERENCES "public"."revisions"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "product_uses" ADD CONSTRAINT "product_uses_organisation_id_job_id_jobs_organisation_id_id_fk" FOREIGN KEY ("organisation_id","job_id") REFERENCES "public"."jobs"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "product_uses" ADD CONSTRAINT "product_uses_organisation_id_shift_id_shifts_organisation_id_id_fk" FOREIGN KEY ("organisation_id","shift_id") REFERENCES "public"."shifts"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sheet_requests" ADD CONSTRAINT "sheet_requests_organisation_id_product_id_products_organisation_id_id_fk" FOREIGN KEY ("organisation_id","product_id") REFERENCES "public"."products"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sheet_requests" ADD CONSTRAINT "sheet_requests_organisation_id_asked_by_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","asked_by") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sheet_requests" ADD CONSTRAINT "sheet_requests_organisation_id_revision_id_revisions_organisation_id_id_fk" FOREIGN KEY ("organisation_id","revision_id") REFERENCES "public"."revisions"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "site_codes" ADD CONSTRAINT "site_codes_organisation_id_job_id_jobs_organisation_id_id_fk" FOREIGN KEY ("organisation_id","job_id") REFERENCES "public"."jobs"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "site_codes" ADD CONSTRAINT "site_codes_organisation_id_made_by_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","made_by") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "product_uses_once" ON "product_uses" USING btree ("organisation_id","product_id","revision_id","shift_id");--> statement-breakpoint
CREATE INDEX "product_uses_by_day" ON "product_uses" USING btree ("organisation_id","used_on","id");--> statement-breakpoint
CREATE INDEX "sheet_requests_by_asking" ON "sheet_requests" USING btree ("organisation_id","asked_at","id");