CREATE TABLE "specification_correction" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"specification_id" uuid NOT NULL,
	"key" text NOT NULL,
	"decision" text NOT NULL,
	"result_id" uuid,
	"rows" jsonb NOT NULL,
	"by_user_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "specification_correction_key_unique" UNIQUE("key"),
	CONSTRAINT "specification_correction_result" CHECK (("specification_correction"."decision" = 'accepted') = ("specification_correction"."result_id" is not null))
);
--> statement-breakpoint
CREATE TABLE "specification_correction_side" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"correction_id" uuid NOT NULL,
	"carcase_id" uuid NOT NULL,
	"side" text NOT NULL,
	CONSTRAINT "side_teaches_once" UNIQUE("carcase_id","side")
);
--> statement-breakpoint
ALTER TABLE "weighing" DROP CONSTRAINT "weighing_grams";--> statement-breakpoint
ALTER TABLE "carcase" ADD COLUMN "left_grams" integer;--> statement-breakpoint
ALTER TABLE "carcase" ADD COLUMN "right_grams" integer;--> statement-breakpoint
ALTER TABLE "cutting_specification" ADD COLUMN "origin" text DEFAULT 'written' NOT NULL;--> statement-breakpoint
ALTER TABLE "cutting_specification" ADD COLUMN "retired_at" timestamp with time zone;--> statement-breakpoint
ALTER TABLE "specification_correction" ADD CONSTRAINT "specification_correction_specification_id_cutting_specification_id_fk" FOREIGN KEY ("specification_id") REFERENCES "public"."cutting_specification"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "specification_correction" ADD CONSTRAINT "specification_correction_result_id_cutting_specification_id_fk" FOREIGN KEY ("result_id") REFERENCES "public"."cutting_specification"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "specification_correction" ADD CONSTRAINT "specification_correction_by_user_id_user_id_fk" FOREIGN KEY ("by_user_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "specification_correction_side" ADD CONSTRAINT "specification_correction_side_correction_id_specification_correction_id_fk" FOREIGN KEY ("correction_id") REFERENCES "public"."specification_correction"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "specification_correction_side" ADD CONSTRAINT "specification_correction_side_carcase_id_carcase_id_fk" FOREIGN KEY ("carcase_id") REFERENCES "public"."carcase"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "specification_correction_specification_id_index" ON "specification_correction" USING btree ("specification_id");--> statement-breakpoint
CREATE INDEX "specification_correction_side_correction_id_index" ON "specification_correction_side" USING btree ("correction_id");--> statement-breakpoint
ALTER TABLE "carcase" ADD CONSTRAINT "carcase_side_grams" CHECK (num_nonnulls("carcase"."left_grams", "carcase"."right_grams") <> 1 and coalesce("carcase"."left_grams", 20000) between 20000 and 360000 and coalesce("carcase"."right_grams", 20000) between 20000 and 360000);--> statement-breakpoint
ALTER TABLE "cutting_specification" ADD CONSTRAINT "cutting_specification_edition" CHECK ("cutting_specification"."edition" > 0);--> statement-breakpoint
ALTER TABLE "weighing" ADD CONSTRAINT "weighing_grams" CHECK ("weighing"."grams" between 0 and case when "weighing"."node" = 'hung' then 700000 else 360000 end);