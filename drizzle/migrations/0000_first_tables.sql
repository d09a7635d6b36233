CREATE TABLE "acknowledgements" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"version_id" uuid NOT NULL,
	"version_number" integer NOT NULL,
	"job_id" uuid NOT NULL,
	"job_name" text NOT NULL,
	"shift_id" uuid NOT NULL,
	"shift_date" date NOT NULL,
	"person_id" uuid NOT NULL,
	"person_name" text NOT NULL,
	"kind" text NOT NULL,
	"language" text NOT NULL,
	"text_sha256" text NOT NULL,
	"reason" text,
	"strokes" text NOT NULL,
	"pin_state" text NOT NULL,
	"was_superseded" boolean NOT NULL,
	"captured_at" timestamp with time zone NOT NULL,
	"received_at" timestamp with time zone NOT NULL,
	"clock_offset_seconds" integer,
	"tablet_id" uuid,
	"tablet_name" text,
	"delivery_id" uuid,
	"entry_index" bigint NOT NULL,
	CONSTRAINT "acknowledgements_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
CREATE TABLE "corrective_actions" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"shift_id" uuid NOT NULL,
	"version_id" uuid,
	"task_id" uuid,
	"line_id" text,
	"text" text NOT NULL,
	"opened_at" timestamp with time zone NOT NULL,
	"opened_by" text NOT NULL,
	"delivery_id" uuid,
	"owner_person_id" uuid,
	"resolved_at" timestamp with time zone,
	"resolved_by" text,
	"evidence" text,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "corrective_actions_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
CREATE TABLE "answer_sets" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"kind" text NOT NULL,
	"version_id" uuid NOT NULL,
	"task_id" uuid,
	"person_id" uuid NOT NULL,
	"answers" text NOT NULL,
	"captured_at" timestamp with time zone NOT NULL,
	"received_at" timestamp with time zone NOT NULL,
	"delivery_id" uuid NOT NULL,
	CONSTRAINT "answer_sets_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
CREATE TABLE "checklist_people" (
	"organisation_id" uuid NOT NULL,
	"version_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"name" text NOT NULL,
	"language" text NOT NULL,
	CONSTRAINT "checklist_people_organisation_id_version_id_person_id_pk" PRIMARY KEY("organisation_id","version_id","person_id")
);
--> statement-breakpoint
CREATE TABLE "checklist_texts" (
	"organisation_id" uuid NOT NULL,
	"version_id" uuid NOT NULL,
	"language" text NOT NULL,
	"bytes" "bytea" NOT NULL,
	"sha256" text NOT NULL,
	CONSTRAINT "checklist_texts_organisation_id_version_id_language_pk" PRIMARY KEY("organisation_id","version_id","language")
);
--> statement-breakpoint
CREATE TABLE "checklist_versions" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"shift_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"date" date NOT NULL,
	"number" integer NOT NULL,
	"facts" "bytea" NOT NULL,
	"checklist" "bytea" NOT NULL,
	"facts_sha256" text NOT NULL,
	"manifest" text NOT NULL,
	"manifest_sha256" text NOT NULL,
	"published_by" uuid NOT NULL,
	"published_by_name" text NOT NULL,
	"published_at" timestamp with time zone NOT NULL,
	CONSTRAINT "checklist_versions_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
CREATE TABLE "attempts" (
	"key" text PRIMARY KEY NOT NULL,
	"failures" integer NOT NULL,
	"last_failure_at" timestamp with time zone NOT NULL
);
--> statement-breakpoint
CREATE TABLE "logins" (
	"email" text PRIMARY KEY NOT NULL,
	"organisation_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"role" text NOT NULL,
	"password_hash" text NOT NULL,
	"sessions_valid_from" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "sessions" (
	"sid" varchar NOT NULL,
	"sess" jsonb NOT NULL,
	"expire" timestamp (6) NOT NULL,
	CONSTRAINT "sessions_sid_pk" PRIMARY KEY("sid")
);
--> statement-breakpoint
CREATE TABLE "tablet_keys" (
	"tablet_id" uuid PRIMARY KEY NOT NULL,
	"organisation_id" uuid NOT NULL,
	"pairing_hash" "bytea",
	"pairing_expires_at" timestamp with time zone,
	"token_hash" "bytea",
	CONSTRAINT "tablet_keys_tokenHash_unique" UNIQUE("token_hash")
);
--> statement-breakpoint
CREATE TABLE "equipment" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"facts" jsonb NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "equipment_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
CREATE TABLE "exposure_bases" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"task_kind" text NOT NULL,
	"kind" text NOT NULL,
	"exposure_micrograms_per_m_3" double precision,
	"conditions" text NOT NULL,
	"ends_on" date NOT NULL,
	"interim_apf" double precision,
	"signed_by" uuid NOT NULL,
	"signed_by_name" text NOT NULL,
	"signed_at" timestamp with time zone NOT NULL,
	"signed_on" date NOT NULL,
	CONSTRAINT "exposure_bases_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
CREATE TABLE "jobs" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"site_name" text NOT NULL,
	"site_controller" text,
	"jurisdiction_id" text NOT NULL,
	"time_zone" text NOT NULL,
	"is_open" boolean DEFAULT true NOT NULL,
	"site" jsonb NOT NULL,
	"created_at" timestamp with time zone NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "jobs_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
CREATE TABLE "shift_equipment" (
	"organisation_id" uuid NOT NULL,
	"shift_id" uuid NOT NULL,
	"equipment_id" uuid NOT NULL,
	CONSTRAINT "shift_equipment_organisation_id_shift_id_equipment_id_pk" PRIMARY KEY("organisation_id","shift_id","equipment_id")
);
--> statement-breakpoint
CREATE TABLE "shift_kits" (
	"organisation_id" uuid NOT NULL,
	"shift_id" uuid NOT NULL,
	"kit_id" uuid NOT NULL,
	CONSTRAINT "shift_kits_organisation_id_shift_id_kit_id_pk" PRIMARY KEY("organisation_id","shift_id","kit_id")
);
--> statement-breakpoint
CREATE TABLE "shift_people" (
	"organisation_id" uuid NOT NULL,
	"shift_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	CONSTRAINT "shift_people_organisation_id_shift_id_person_id_pk" PRIMARY KEY("organisation_id","shift_id","person_id")
);
--> statement-breakpoint
CREATE TABLE "shifts" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"date" date NOT NULL,
	"plan" jsonb NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "shifts_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
CREATE TABLE "organisations" (
	"organisation_id" uuid PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"auditor_emails" text[] DEFAULT '{}'::text[] NOT NULL,
	"phone" text,
	"settings" jsonb DEFAULT '{}'::jsonb NOT NULL
);
--> statement-breakpoint
CREATE TABLE "people" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"language" text NOT NULL,
	"employer" text,
	"is_adult_confirmed" boolean DEFAULT false NOT NULL,
	"is_kept_from_isocyanates" boolean DEFAULT false NOT NULL,
	"silica_trained_on" date,
	"hazcom_trained_on" date,
	"respirators" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"is_active" boolean DEFAULT true NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "people_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
CREATE TABLE "pins" (
	"organisation_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"digest" text NOT NULL,
	"set_at" timestamp with time zone NOT NULL,
	"witness_person_id" uuid,
	"tablet_id" uuid,
	CONSTRAINT "pins_organisation_id_person_id_pk" PRIMARY KEY("organisation_id","person_id")
);
--> statement-breakpoint
CREATE TABLE "recordlog_checkpoints" (
	"organisation_id" uuid NOT NULL,
	"size" bigint NOT NULL,
	"root" "bytea" NOT NULL,
	"note" text NOT NULL,
	"created_at" timestamp with time zone NOT NULL,
	CONSTRAINT "recordlog_checkpoints_organisation_id_size_pk" PRIMARY KEY("organisation_id","size")
);
--> statement-breakpoint
CREATE TABLE "recordlog_entries" (
	"organisation_id" uuid NOT NULL,
	"index" bigint NOT NULL,
	"kind" text NOT NULL,
	"subject_id" uuid NOT NULL,
	"recorded_at" timestamp with time zone NOT NULL,
	"leaf" text NOT NULL,
	"leaf_hash" "bytea" NOT NULL,
	CONSTRAINT "recordlog_entries_organisation_id_index_pk" PRIMARY KEY("organisation_id","index")
);
--> statement-breakpoint
CREATE TABLE "recordlog_heads" (
	"organisation_id" uuid PRIMARY KEY NOT NULL,
	"size" bigint NOT NULL,
	"last_recorded_at" timestamp with time zone NOT NULL,
	"acknowledgement_count" bigint DEFAULT 0 NOT NULL
);
--> statement-breakpoint
CREATE TABLE "recordlog_records" (
	"organisation_id" uuid NOT NULL,
	"index" bigint NOT NULL,
	"salt" "bytea" NOT NULL,
	"bytes" "bytea" NOT NULL,
	CONSTRAINT "recordlog_records_organisation_id_index_pk" PRIMARY KEY("organisation_id","index")
);
--> statement-breakpoint
CREATE TABLE "kit_parts" (
	"organisation_id" uuid NOT NULL,
	"kit_id" uuid NOT NULL,
	"position" integer NOT NULL,
	"product_id" uuid NOT NULL,
	"part" text NOT NULL,
	"form" text NOT NULL,
	CONSTRAINT "kit_parts_organisation_id_kit_id_position_pk" PRIMARY KEY("organisation_id","kit_id","position")
);
--> statement-breakpoint
CREATE TABLE "kits" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"volume_l" double precision NOT NULL,
	"mix_minutes_per_kit" double precision NOT NULL,
	"bucket_minutes" double precision,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "kits_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
CREATE TABLE "products" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"supplier" text NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "products_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
CREATE TABLE "revisions" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"sha256" text NOT NULL,
	"byte_length" bigint NOT NULL,
	"file_name" text NOT NULL,
	"state" text NOT NULL,
	"reader_state" text,
	"pages" integer,
	"fields" jsonb,
	"product_id" uuid,
	"language" text,
	"revised_on" date,
	"is_current" boolean DEFAULT false NOT NULL,
	"uploaded_by" uuid NOT NULL,
	"uploaded_at" timestamp with time zone NOT NULL,
	"confirmed_by" uuid,
	"confirmed_at" timestamp with time zone,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "revisions_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
CREATE TABLE "deliveries" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"tablet_id" uuid NOT NULL,
	"bytes" "bytea" NOT NULL,
	"received_at" timestamp with time zone NOT NULL,
	"sent_at" timestamp with time zone NOT NULL,
	CONSTRAINT "deliveries_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
CREATE TABLE "delivery_outcomes" (
	"organisation_id" uuid NOT NULL,
	"delivery_id" uuid NOT NULL,
	"outcome" text NOT NULL,
	"subject_id" uuid,
	"because" text,
	"decided_at" timestamp with time zone NOT NULL,
	"receipt" text NOT NULL,
	CONSTRAINT "delivery_outcomes_organisation_id_delivery_id_pk" PRIMARY KEY("organisation_id","delivery_id")
);
--> statement-breakpoint
CREATE TABLE "tablets" (
	"organisation_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"paired_at" timestamp with time zone,
	"last_heard_at" timestamp with time zone,
	"withdrawn_at" timestamp with time zone,
	CONSTRAINT "tablets_organisation_id_id_pk" PRIMARY KEY("organisation_id","id")
);
--> statement-breakpoint
ALTER TABLE "acknowledgements" ADD CONSTRAINT "acknowledgements_organisation_id_version_id_checklist_versions_organisation_id_id_fk" FOREIGN KEY ("organisation_id","version_id") REFERENCES "public"."checklist_versions"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "acknowledgements" ADD CONSTRAINT "acknowledgements_organisation_id_job_id_jobs_organisation_id_id_fk" FOREIGN KEY ("organisation_id","job_id") REFERENCES "public"."jobs"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "acknowledgements" ADD CONSTRAINT "acknowledgements_organisation_id_shift_id_shifts_organisation_id_id_fk" FOREIGN KEY ("organisation_id","shift_id") REFERENCES "public"."shifts"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "acknowledgements" ADD CONSTRAINT "acknowledgements_organisation_id_person_id_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","person_id") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "acknowledgements" ADD CONSTRAINT "acknowledgements_organisation_id_tablet_id_tablets_organisation_id_id_fk" FOREIGN KEY ("organisation_id","tablet_id") REFERENCES "public"."tablets"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "acknowledgements" ADD CONSTRAINT "acknowledgements_organisation_id_delivery_id_deliveries_organisation_id_id_fk" FOREIGN KEY ("organisation_id","delivery_id") REFERENCES "public"."deliveries"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "corrective_actions" ADD CONSTRAINT "corrective_actions_organisation_id_job_id_jobs_organisation_id_id_fk" FOREIGN KEY ("organisation_id","job_id") REFERENCES "public"."jobs"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "corrective_actions" ADD CONSTRAINT "corrective_actions_organisation_id_shift_id_shifts_organisation_id_id_fk" FOREIGN KEY ("organisation_id","shift_id") REFERENCES "public"."shifts"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "corrective_actions" ADD CONSTRAINT "corrective_actions_organisation_id_owner_person_id_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","owner_person_id") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "answer_sets" ADD CONSTRAINT "answer_sets_organisation_id_version_id_checklist_versions_organisation_id_id_fk" FOREIGN KEY ("organisation_id","version_id") REFERENCES "public"."checklist_versions"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "answer_sets" ADD CONSTRAINT "answer_sets_organisation_id_person_id_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","person_id") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "checklist_people" ADD CONSTRAINT "checklist_people_organisation_id_version_id_checklist_versions_organisation_id_id_fk" FOREIGN KEY ("organisation_id","version_id") REFERENCES "public"."checklist_versions"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "checklist_people" ADD CONSTRAINT "checklist_people_organisation_id_person_id_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","person_id") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "checklist_texts" ADD CONSTRAINT "checklist_texts_organisation_id_version_id_checklist_versions_organisation_id_id_fk" FOREIGN KEY ("organisation_id","version_id") REFERENCES "public"."checklist_versions"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "checklist_versions" ADD CONSTRAINT "checklist_versions_organisation_id_shift_id_shifts_organisation_id_id_fk" FOREIGN KEY ("organisation_id","shift_id") REFERENCES "public"."shifts"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "checklist_versions" ADD CONSTRAINT "checklist_versions_organisation_id_job_id_jobs_organisation_id_id_fk" FOREIGN KEY ("organisation_id","job_id") REFERENCES "public"."jobs"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "checklist_versions" ADD CONSTRAINT "checklist_versions_organisation_id_published_by_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","published_by") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "equipment" ADD CONSTRAINT "equipment_organisation_id_organisations_organisation_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("organisation_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "exposure_bases" ADD CONSTRAINT "exposure_bases_organisation_id_job_id_jobs_organisation_id_id_fk" FOREIGN KEY ("organisation_id","job_id") REFERENCES "public"."jobs"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "exposure_bases" ADD CONSTRAINT "exposure_bases_organisation_id_signed_by_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","signed_by") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "jobs" ADD CONSTRAINT "jobs_organisation_id_organisations_organisation_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("organisation_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "shift_equipment" ADD CONSTRAINT "shift_equipment_organisation_id_shift_id_shifts_organisation_id_id_fk" FOREIGN KEY ("organisation_id","shift_id") REFERENCES "public"."shifts"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "shift_equipment" ADD CONSTRAINT "shift_equipment_organisation_id_equipment_id_equipment_organisation_id_id_fk" FOREIGN KEY ("organisation_id","equipment_id") REFERENCES "public"."equipment"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "shift_kits" ADD CONSTRAINT "shift_kits_organisation_id_shift_id_shifts_organisation_id_id_fk" FOREIGN KEY ("organisation_id","shift_id") REFERENCES "public"."shifts"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "shift_kits" ADD CONSTRAINT "shift_kits_organisation_id_kit_id_kits_organisation_id_id_fk" FOREIGN KEY ("organisation_id","kit_id") REFERENCES "public"."kits"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "shift_people" ADD CONSTRAINT "shift_people_organisation_id_shift_id_shifts_organisation_id_id_fk" FOREIGN KEY ("organisation_id","shift_id") REFERENCES "public"."shifts"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "shift_people" ADD CONSTRAINT "shift_people_organisation_id_person_id_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","person_id") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "shifts" ADD CONSTRAINT "shifts_organisation_id_job_id_jobs_organisation_id_id_fk" FOREIGN KEY ("organisation_id","job_id") REFERENCES "public"."jobs"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "people" ADD CONSTRAINT "people_organisation_id_organisations_organisation_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("organisation_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pins" ADD CONSTRAINT "pins_organisation_id_person_id_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","person_id") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recordlog_checkpoints" ADD CONSTRAINT "recordlog_checkpoints_organisation_id_organisations_organisation_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("organisation_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recordlog_entries" ADD CONSTRAINT "recordlog_entries_organisation_id_organisations_organisation_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("organisation_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recordlog_heads" ADD CONSTRAINT "recordlog_heads_organisation_id_organisations_organisation_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("organisation_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recordlog_records" ADD CONSTRAINT "recordlog_records_organisation_id_index_recordlog_entries_organisation_id_index_fk" FOREIGN KEY ("organisation_id","index") REFERENCES "public"."recordlog_entries"("organisation_id","index") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "kit_parts" ADD CONSTRAINT "kit_parts_organisation_id_kit_id_kits_organisation_id_id_fk" FOREIGN KEY ("organisation_id","kit_id") REFERENCES "public"."kits"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "kit_parts" ADD CONSTRAINT "kit_parts_organisation_id_product_id_products_organisation_id_id_fk" FOREIGN KEY ("organisation_id","product_id") REFERENCES "public"."products"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "kits" ADD CONSTRAINT "kits_organisation_id_organisations_organisation_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("organisation_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "products" ADD CONSTRAINT "products_organisation_id_organisations_organisation_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("organisation_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revisions" ADD CONSTRAINT "revisions_organisation_id_organisations_organisation_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("organisation_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revisions" ADD CONSTRAINT "revisions_organisation_id_product_id_products_organisation_id_id_fk" FOREIGN KEY ("organisation_id","product_id") REFERENCES "public"."products"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revisions" ADD CONSTRAINT "revisions_organisation_id_uploaded_by_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","uploaded_by") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revisions" ADD CONSTRAINT "revisions_organisation_id_confirmed_by_people_organisation_id_id_fk" FOREIGN KEY ("organisation_id","confirmed_by") REFERENCES "public"."people"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "deliveries" ADD CONSTRAINT "deliveries_organisation_id_tablet_id_tablets_organisation_id_id_fk" FOREIGN KEY ("organisation_id","tablet_id") REFERENCES "public"."tablets"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "delivery_outcomes" ADD CONSTRAINT "delivery_outcomes_organisation_id_delivery_id_deliveries_organisation_id_id_fk" FOREIGN KEY ("organisation_id","delivery_id") REFERENCES "public"."deliveries"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "tablets" ADD CONSTRAINT "tablets_organisation_id_organisations_organisation_id_fk" FOREIGN KEY ("organisation_id") REFERENCES "public"."organisations"("organisation_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "acknowledgements_one_signature" ON "acknowledgements" USING btree ("organisation_id","version_id","person_id") WHERE kind = 'signed';--> statement-breakpoint
CREATE UNIQUE INDEX "acknowledgements_by_entry" ON "acknowledgements" USING btree ("organisation_id","entry_index");--> statement-breakpoint
CREATE INDEX "acknowledgements_by_person" ON "acknowledgements" USING btree ("organisation_id","person_id","shift_date","entry_index");--> statement-breakpoint
CREATE INDEX "acknowledgements_by_job" ON "acknowledgements" USING btree ("organisation_id","job_id","shift_date","entry_index");--> statement-breakpoint
CREATE INDEX "acknowledgements_by_kind" ON "acknowledgements" USING btree ("organisation_id","kind","entry_index");--> statement-breakpoint
CREATE INDEX "acknowledgements_by_day" ON "acknowledgements" USING btree ("organisation_id","shift_date","entry_index");--> statement-breakpoint
CREATE INDEX "corrective_actions_open" ON "corrective_actions" USING btree ("organisation_id","shift_id") WHERE resolved_at is null;--> statement-breakpoint
CREATE INDEX "corrective_actions_by_opening" ON "corrective_actions" USING btree ("organisation_id","opened_at","id");--> statement-breakpoint
CREATE INDEX "answer_sets_by_version" ON "answer_sets" USING btree ("organisation_id","version_id","captured_at");--> statement-breakpoint
CREATE UNIQUE INDEX "checklist_versions_by_number" ON "checklist_versions" USING btree ("organisation_id","shift_id","number");--> statement-breakpoint
CREATE INDEX "sessions_by_expire" ON "sessions" USING btree ("expire");--> statement-breakpoint
CREATE INDEX "equipment_by_name" ON "equipment" USING btree ("organisation_id","name","id");--> statement-breakpoint
CREATE INDEX "exposure_bases_by_job" ON "exposure_bases" USING btree ("organisation_id","job_id");--> statement-breakpoint
CREATE INDEX "jobs_by_creation" ON "jobs" USING btree ("organisation_id","created_at","id");--> statement-breakpoint
CREATE INDEX "shift_people_by_person" ON "shift_people" USING btree ("organisation_id","person_id");--> statement-breakpoint
CREATE UNIQUE INDEX "shifts_by_day" ON "shifts" USING btree ("organisation_id","job_id","date");--> statement-breakpoint
CREATE INDEX "shifts_by_date" ON "shifts" USING btree ("organisation_id","date");--> statement-breakpoint
CREATE INDEX "people_by_name" ON "people" USING btree ("organisation_id","name","id");--> statement-breakpoint
CREATE UNIQUE INDEX "recordlog_entries_by_subject" ON "recordlog_entries" USING btree ("organisation_id","subject_id","kind","index");--> statement-breakpoint
CREATE UNIQUE INDEX "products_by_name" ON "products" USING btree ("organisation_id","name","supplier");--> statement-breakpoint
CREATE UNIQUE INDEX "revisions_by_hash" ON "revisions" USING btree ("organisation_id","sha256");--> statement-breakpoint
CREATE UNIQUE INDEX "revisions_current" ON "revisions" USING btree ("organisation_id","product_id","language") WHERE is_current;--> statement-breakpoint
CREATE INDEX "revisions_by_upload" ON "revisions" USING btree ("organisation_id","uploaded_at","id");