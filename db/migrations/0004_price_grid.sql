CREATE TABLE "price_grid" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"edition" integer NOT NULL,
	"valid_from" date NOT NULL,
	"base_tenth_pence_per_kg" integer NOT NULL,
	"grid" jsonb NOT NULL,
	"levy_pence" integer NOT NULL,
	"haulage_pence" integer NOT NULL,
	"deductions_pence" integer NOT NULL,
	"by_user_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "price_grid_edition_unique" UNIQUE("edition"),
	CONSTRAINT "price_grid_edition" CHECK ("price_grid"."edition" > 0),
	CONSTRAINT "price_grid_base" CHECK ("price_grid"."base_tenth_pence_per_kg" > 0),
	CONSTRAINT "price_grid_deductions" CHECK ("price_grid"."levy_pence" >= 0 and "price_grid"."haulage_pence" >= 0 and "price_grid"."deductions_pence" >= 0)
);
--> statement-breakpoint
ALTER TABLE "price_grid" ADD CONSTRAINT "price_grid_by_user_id_user_id_fk" FOREIGN KEY ("by_user_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;