DROP INDEX "section_depth";--> statement-breakpoint
DROP INDEX "section_mass";--> statement-breakpoint
ALTER TABLE "section" ADD COLUMN "family" text GENERATED ALWAYS AS (substring(designation_key from '^[a-z]*')) STORED;--> statement-breakpoint
ALTER TABLE "section" ADD COLUMN "sizes" double precision[] GENERATED ALWAYS AS (string_to_array(regexp_replace(designation_key, '^[a-z]*', ''), 'x')::float8[]) STORED;--> statement-breakpoint
CREATE INDEX "section_by_depth" ON "section" USING btree ("practice_id","depth_mm","mass_kg_m","revision_id");--> statement-breakpoint
CREATE INDEX "section_by_mass" ON "section" USING btree ("practice_id","mass_kg_m","depth_mm","revision_id");