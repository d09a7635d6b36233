CREATE TABLE "spent_seals" (
	"organisation_id" uuid NOT NULL,
	"nonce" text NOT NULL,
	"delivery_id" uuid NOT NULL,
	CONSTRAINT "spent_seals_organisation_id_nonce_pk" PRIMARY KEY("organisation_id","nonce")
);
--> statement-breakpoint
ALTER TABLE "spent_seals" ADD CONSTRAINT "spent_seals_organisation_id_delivery_id_deliveries_organisation_id_id_fk" FOREIGN KEY ("organisation_id","delivery_id") REFERENCES "public"."deliveries"("organisation_id","id") ON DELETE no action ON UPDATE no action;