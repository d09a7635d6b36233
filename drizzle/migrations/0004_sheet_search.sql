CREATE EXTENSION IF NOT EXISTS btree_gin;--> statement-breakpoint
CREATE EXTENSION IF NOT EXISTS pg_trgm;--> statement-breakpoint
CREATE EXTENSION IF NOT EXISTS fuzzystrmatch;--> statement-breakpoint
CREATE TABLE "sheet_search" (
	"organisation_id" uuid NOT NULL,
	"revision_id" uuid NOT NULL,
	"product_id" uuid,
	"state" text NOT NULL,
	"language" text,
	"signal_word" text,
	"standing" smallint NOT NULL,
	"uploaded_at" timestamp with time zone NOT NULL,
	"name" text NOT NULL,
	"supplier" text NOT NULL,
	"keys" "tsvector" NOT NULL,
	"document" "tsvector" NOT NULL,
	"field_text" text NOT NULL,
	"full_text" text,
	CONSTRAINT "sheet_search_organisation_id_revision_id_pk" PRIMARY KEY("organisation_id","revision_id")
);
--> statement-breakpoint
CREATE TABLE "sheet_words" (
	"organisation_id" uuid NOT NULL,
	"word" text NOT NULL,
	CONSTRAINT "sheet_words_organisation_id_word_pk" PRIMARY KEY("organisation_id","word")
);
--> statement-breakpoint
ALTER TABLE "sheet_search" ADD CONSTRAINT "sheet_search_organisation_id_revision_id_revisions_organisation_id_id_fk" FOREIGN KEY ("organisation_id","revision_id") REFERENCES "public"."revisions"("organisation_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "sheet_search_by_name" ON "sheet_search" USING btree ("organisation_id","name" text_pattern_ops);--> statement-breakpoint
CREATE INDEX "sheet_search_by_key" ON "sheet_search" USING gin ("organisation_id","keys") WITH (fastupdate=false);--> statement-breakpoint
CREATE INDEX "sheet_search_by_word" ON "sheet_search" USING gin ("organisation_id","document") WITH (fastupdate=false);--> statement-breakpoint
CREATE INDEX "sheet_words_by_part" ON "sheet_words" USING gin ("organisation_id","word" gin_trgm_ops) WITH (fastupdate=false);