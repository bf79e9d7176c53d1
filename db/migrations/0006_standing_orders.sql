CREATE TABLE "standing_order" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"user_id" uuid NOT NULL,
	"basket_key" uuid NOT NULL,
	"box_kind_id" uuid NOT NULL,
	"quantity" integer NOT NULL,
	"every_weeks" integer NOT NULL,
	"point_id" uuid NOT NULL,
	"time" text NOT NULL,
	"phone" text NOT NULL,
	"state" text DEFAULT 'pending' NOT NULL,
	"next_from" date NOT NULL,
	"provider_customer_id" text,
	"provider_method_id" text,
	"terms" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "standing_order_basketKey_unique" UNIQUE("basket_key"),
	CONSTRAINT "standing_order_weeks" CHECK ("standing_order"."every_weeks" in (4, 6, 8, 12)),
	CONSTRAINT "standing_order_quantity" CHECK ("standing_order"."quantity" between 1 and 9),
	CONSTRAINT "standing_order_card" CHECK ("standing_order"."state" not in ('active', 'paused')
        or ("standing_order"."provider_customer_id" is not null and "standing_order"."provider_method_id" is not null))
);
--> statement-breakpoint
CREATE TABLE "standing_turn" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"standing_order_id" uuid NOT NULL,
	"cutting_day_id" uuid NOT NULL,
	"order_id" uuid NOT NULL,
	"token" text NOT NULL,
	"state" text DEFAULT 'planned' NOT NULL,
	"charge_at" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "standing_turn_orderId_unique" UNIQUE("order_id"),
	CONSTRAINT "standing_turn_token_unique" UNIQUE("token"),
	CONSTRAINT "standing_turn_standingOrderId_cuttingDayId_unique" UNIQUE("standing_order_id","cutting_day_id")
);
--> statement-breakpoint
ALTER TABLE "customer_order" ADD COLUMN "keeps_card" boolean DEFAULT false NOT NULL;--> statement-breakpoint
ALTER TABLE "standing_order" ADD CONSTRAINT "standing_order_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "standing_order" ADD CONSTRAINT "standing_order_box_kind_id_box_kind_id_fk" FOREIGN KEY ("box_kind_id") REFERENCES "public"."box_kind"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "standing_order" ADD CONSTRAINT "standing_order_point_id_collection_point_id_fk" FOREIGN KEY ("point_id") REFERENCES "public"."collection_point"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "standing_turn" ADD CONSTRAINT "standing_turn_standing_order_id_standing_order_id_fk" FOREIGN KEY ("standing_order_id") REFERENCES "public"."standing_order"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "standing_turn" ADD CONSTRAINT "standing_turn_cutting_day_id_cutting_day_id_fk" FOREIGN KEY ("cutting_day_id") REFERENCES "public"."cutting_day"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "standing_turn" ADD CONSTRAINT "standing_turn_order_id_customer_order_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."customer_order"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "standing_order_user_id_index" ON "standing_order" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "standing_order_state_index" ON "standing_order" USING btree ("state");--> statement-breakpoint
CREATE INDEX "standing_turn_state_charge_at_index" ON "standing_turn" USING btree ("state","charge_at");