DROP INDEX "section_by_depth";--> statement-breakpoint
DROP INDEX "section_by_mass";--> statement-breakpoint
DROP INDEX "section_by_series";