ALTER TABLE "people" ADD COLUMN "silica_trained_by" text;--> statement-breakpoint
ALTER TABLE "people" ADD COLUMN "hazcom_trained_by" text;--> statement-breakpoint
ALTER TABLE "kits" ADD COLUMN "surface_exception" jsonb;--> statement-breakpoint
ALTER TABLE "kits" ADD COLUMN "cartridge_schedule" jsonb;