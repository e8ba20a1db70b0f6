ALTER TABLE "member" ADD COLUMN "material_revision_id" uuid;--> statement-breakpoint
ALTER TABLE "member" ADD COLUMN "combination_revision_id" uuid;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_material_fk" FOREIGN KEY ("practice_id","material_revision_id") REFERENCES "public"."revision"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_combination_fk" FOREIGN KEY ("practice_id","combination_revision_id") REFERENCES "public"."revision"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "member_material" ON "member" USING btree ("practice_id","material_revision_id");--> statement-breakpoint
CREATE INDEX "member_combination" ON "member" USING btree ("practice_id","combination_revision_id");