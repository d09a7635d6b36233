CREATE TABLE "guess_alarms" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"email" text NOT NULL,
	"failures" integer NOT NULL,
	"addresses" integer NOT NULL,
	"first_at" timestamp with time zone NOT NULL,
	"last_at" timestamp with time zone NOT NULL,
	"mailed_at" timestamp with time zone,
	CONSTRAINT "guess_alarms_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
CREATE TABLE "pin_events" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"event" text NOT NULL,
	"person_id" uuid NOT NULL,
	"person_name" text NOT NULL,
	"proof" text,
	"by_person_id" uuid,
	"by_name" text,
	"tablet_id" uuid,
	"tablet_name" text,
	"delivery_id" uuid,
	"captured_at" timestamp with time zone,
	"at" timestamp with time zone NOT NULL,
	"entry_index" bigint NOT NULL,
	CONSTRAINT "pin_events_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
CREATE TABLE "start_pins" (
	"organisation_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"digest" text NOT NULL,
	"given_by" uuid NOT NULL,
	"given_by_name" text NOT NULL,
	"given_at" timestamp with time zone NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	CONSTRAINT "start_pins_organisation_id_person_id_pk" PRIMARY KEY("organisation_id","person_id")
);
--> statement-breakpoint
DROP INDEX "acknowledgements_one_standing";--> statement-breakpoint
ALTER TABLE "acknowledgements" ALTER COLUMN "clock_offset_seconds" SET DATA TYPE bigint;--> statement-breakpoint
ALTER TABLE "acknowledgements" ADD COLUMN "time_doubt" text;--> statement-breakpoint
ALTER TABLE "answer_sets" ADD COLUMN "pin_state" text DEFAULT 'not-set' NOT NULL;--> statement-breakpoint
ALTER TABLE "answer_sets" ADD COLUMN "time_doubt" text;--> statement-breakpoint
ALTER TABLE "people" ADD COLUMN "units" jsonb DEFAULT '{}'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "pins" ADD COLUMN "proof" text DEFAULT 'none' NOT NULL;--> statement-breakpoint
ALTER TABLE "guess_alarms" ADD CONSTRAINT "guess_alarms_organisation_id_person_id_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","person_id") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pin_events" ADD CONSTRAINT "pin_events_organisation_id_person_id_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","person_id") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pin_events" ADD CONSTRAINT "pin_events_organisation_id_by_person_id_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","by_person_id") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pin_events" ADD CONSTRAINT "pin_events_organisation_id_tablet_id_tablets_organisation_id_id_fk" FOREIGN KEY ("organisation_id","tablet_id") REFERENCES "public"."tablets"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pin_events" ADD CONSTRAINT "pin_events_organisation_id_delivery_id_deliveries_organisation_id_id_fk" FOREIGN KEY ("organisation_id","delivery_id") REFERENCES "public"."deliveries"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "start_pins" ADD CONSTRAINT "start_pins_organisation_id_person_id_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","person_id") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "start_pins" ADD CONSTRAINT "start_pins_organisation_id_given_by_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","given_by") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "guess_alarms_by_time" ON "guess_alarms" USING btree ("organisation_id","last_at");--> statement-breakpoint
CREATE UNIQUE INDEX "pin_events_by_entry" ON "pin_events" USING btree ("organisation_id","entry_index");--> statement-breakpoint
CREATE INDEX "pin_events_by_person" ON "pin_events" USING btree ("organisation_id","person_id","entry_index");--> statement-breakpoint
ALTER TABLE "corrective_actions" ADD CONSTRAINT "corrective_actions_organisation_id_version_id_checklist_versions_organisation_id_id_fk" FOREIGN KEY ("organisation_id","version_id") REFERENCES "public"."checklist_versions"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "corrective_actions" ADD CONSTRAINT "corrective_actions_organisation_id_delivery_id_deliveries_organisation_id_id_fk" FOREIGN KEY ("organisation_id","delivery_id") REFERENCES "public"."deliveries"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "answer_sets" ADD CONSTRAINT "answer_sets_organisation_id_delivery_id_deliveries_organisation_id_id_fk" FOREIGN KEY ("organisation_id","delivery_id") REFERENCES "public"."deliveries"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pins" ADD CONSTRAINT "pins_organisation_id_witness_person_id_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","witness_person_id") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pins" ADD CONSTRAINT "pins_organisation_id_tablet_id_tablets_organisation_id_id_fk" FOREIGN KEY ("organisation_id","tablet_id") REFERENCES "public"."tablets"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "acknowledgements_one_proven" ON "acknowledgements" USING btree ("organisation_id","version_id","person_id") WHERE kind = 'signed' AND pin_state = 'confirmed';