CREATE TABLE "stock_line" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"list_id" uuid NOT NULL,
	"table_slug" text NOT NULL,
	"designation_key" text NOT NULL,
	"designation" text NOT NULL,
	"lengths_m" double precision[] DEFAULT '{}' NOT NULL,
	"lead_time_days" integer,
	"price_band" text,
	"note" text DEFAULT '' NOT NULL,
	CONSTRAINT "stock_line_practice_id_id_pk" PRIMARY KEY("practice_id","id"),
	CONSTRAINT "stock_line_lead_time" CHECK ("stock_line"."lead_time_days" >= 0),
	CONSTRAINT "stock_line_price_band" CHECK ("stock_line"."price_band" in ('A', 'B', 'C', 'D', 'E'))
);
--> statement-breakpoint
ALTER TABLE "stock_line" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "stock_list" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"slug" text NOT NULL,
	"supplier" text NOT NULL,
	"note" text DEFAULT '' NOT NULL,
	"as_of" date NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"created_by_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"changed_by_id" uuid NOT NULL,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "stock_list_practice_id_id_pk" PRIMARY KEY("practice_id","id"),
	CONSTRAINT "stock_list_slug_form" CHECK ("stock_list"."slug" ~ '^[a-z0-9]+(-[a-z0-9]+)*$')
);
--> statement-breakpoint
ALTER TABLE "stock_list" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "stock_line" ADD CONSTRAINT "stock_line_list_fk" FOREIGN KEY ("practice_id","list_id") REFERENCES "public"."stock_list"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "stock_list" ADD CONSTRAINT "stock_list_created_by_fk" FOREIGN KEY ("practice_id","created_by_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "stock_list" ADD CONSTRAINT "stock_list_changed_by_fk" FOREIGN KEY ("practice_id","changed_by_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "stock_line_section" ON "stock_line" USING btree ("practice_id","list_id","table_slug","designation_key");--> statement-breakpoint
CREATE INDEX "stock_line_of_section" ON "stock_line" USING btree ("practice_id","table_slug","designation_key");--> statement-breakpoint
CREATE UNIQUE INDEX "stock_list_slug" ON "stock_list" USING btree ("practice_id","slug");--> statement-breakpoint
CREATE POLICY "stock_line_of_practice" ON "stock_line" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "stock_list_of_practice" ON "stock_list" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);