-- What the schema generator cannot say of stock lists: forced policies and grants. Whose list it is, its address and what a
-- line is of are never changed.

ALTER TABLE stock_list FORCE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE stock_line FORCE ROW LEVEL SECURITY;--> statement-breakpoint

GRANT SELECT, INSERT, DELETE, UPDATE (supplier, note, as_of, version, changed_by_id, changed_at) ON stock_list TO putlog_web;--> statement-breakpoint
GRANT SELECT, INSERT, DELETE, UPDATE (lengths_m, lead_time_days, price_band, note) ON stock_line TO putlog_web;
