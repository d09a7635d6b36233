ALTER TABLE "sheet_requests" ALTER COLUMN "product_id" DROP NOT NULL;--> statement-breakpoint
ALTER TABLE "sheet_requests" ADD COLUMN "product_name" text;--> statement-breakpoint
ALTER TABLE "sheet_requests" ADD COLUMN "supplier" text;--> statement-breakpoint
ALTER TABLE "sheet_requests" ADD COLUMN "about_revision_id" uuid;--> statement-breakpoint
ALTER TABLE "sheet_requests" ADD CONSTRAINT "sheet_requests_organisation_id_about_revision_id_revisions_organisation_id_id_fk" FOREIGN KEY ("organisation_id","about_revision_id") REFERENCES "public"."revisions"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sheet_requests" ADD CONSTRAINT "sheet_requests_name_a_product" CHECK ("sheet_requests"."product_id" IS NOT NULL OR ("sheet_requests"."product_name" IS NOT NULL AND "sheet_requests"."supplier" IS NOT NULL AND "sheet_requests"."about_revision_id" IS NOT NULL));