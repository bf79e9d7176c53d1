CREATE TABLE "delivery_area" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"point_id" uuid NOT NULL,
	"name" text NOT NULL,
	"prefixes" text[] NOT NULL,
	"price_pence" integer NOT NULL,
	"free_from_pence" integer,
	"weekday" integer NOT NULL,
	"starts_at" text NOT NULL,
	"ends_at" text NOT NULL,
	"capacity" integer NOT NULL,
	"is_active" boolean DEFAULT true NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "delivery_area_pointId_unique" UNIQUE("point_id"),
	CONSTRAINT "delivery_area_money" CHECK ("delivery_area"."price_pence" >= 0 and coalesce("delivery_area"."free_from_pence" > 0, true)),
	CONSTRAINT "delivery_area_weekday" CHECK ("delivery_area"."weekday" between 1 and 7),
	CONSTRAINT "delivery_area_times" CHECK ("delivery_area"."starts_at" < "delivery_area"."ends_at"),
	CONSTRAINT "delivery_area_capacity" CHECK ("delivery_area"."capacity" > 0),
	CONSTRAINT "delivery_area_prefixes" CHECK (cardinality("delivery_area"."prefixes") > 0)
);
--> statement-breakpoint
CREATE TABLE "order_addition" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"order_id" uuid NOT NULL,
	"state" text DEFAULT 'open' NOT NULL,
	"amount_pence" integer NOT NULL,
	"reached_payment_at" timestamp with time zone NOT NULL,
	"session_id" text,
	"session_url" text,
	"session_expires_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "order_addition_sessionId_unique" UNIQUE("session_id"),
	CONSTRAINT "order_addition_amount" CHECK ("order_addition"."amount_pence" > 0)
);
--> statement-breakpoint
CREATE TABLE "order_addition_line" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"addition_id" uuid NOT NULL,
	"offer_id" uuid NOT NULL,
	"quantity" integer NOT NULL,
	"unit_price_pence" integer NOT NULL,
	"unit_grams" integer NOT NULL,
	"name" text NOT NULL,
	CONSTRAINT "order_addition_line_additionId_offerId_unique" UNIQUE("addition_id","offer_id"),
	CONSTRAINT "order_addition_line_quantity" CHECK ("order_addition_line"."quantity" > 0),
	CONSTRAINT "order_addition_line_price" CHECK ("order_addition_line"."unit_price_pence" > 0 and "order_addition_line"."unit_grams" > 0)
);
--> statement-breakpoint
CREATE TABLE "promo_code" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"code" text NOT NULL,
	"percent" integer,
	"amount_pence" integer,
	"minimum_pence" integer DEFAULT 0 NOT NULL,
	"last_day" date,
	"usage_limit" integer,
	"is_once_per_customer" boolean DEFAULT true NOT NULL,
	"closed_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "promo_code_code_unique" UNIQUE("code"),
	CONSTRAINT "promo_code_letters" CHECK ("promo_code"."code" ~ '^[A-Z0-9]{3,20}$'),
	CONSTRAINT "promo_code_one_kind" CHECK (num_nonnulls("promo_code"."percent", "promo_code"."amount_pence") = 1),
	CONSTRAINT "promo_code_percent" CHECK ("promo_code"."percent" between 1 and 90),
	CONSTRAINT "promo_code_amounts" CHECK ("promo_code"."amount_pence" > 0 and "promo_code"."minimum_pence" >= 0),
	CONSTRAINT "promo_code_limit" CHECK ("promo_code"."usage_limit" > 0)
);
--> statement-breakpoint
CREATE TABLE "promo_use" (
	"order_id" uuid PRIMARY KEY NOT NULL,
	"promo_id" uuid NOT NULL,
	"email" text NOT NULL,
	"user_id" uuid,
	"is_once" boolean NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "order_line" DROP CONSTRAINT "order_line_orderId_offerId_unique";--> statement-breakpoint
DROP INDEX "payment_one_refund_per_reason";--> statement-breakpoint
ALTER TABLE "collection_point" ADD COLUMN "kind" text DEFAULT 'collection' NOT NULL;--> statement-breakpoint
ALTER TABLE "customer_order" ADD COLUMN "discount_pence" integer DEFAULT 0 NOT NULL;--> statement-breakpoint
ALTER TABLE "customer_order" ADD COLUMN "delivery_pence" integer DEFAULT 0 NOT NULL;--> statement-breakpoint
ALTER TABLE "customer_order" ADD COLUMN "delivery_address" text[];--> statement-breakpoint
ALTER TABLE "customer_order" ADD COLUMN "delivery_postcode" text;--> statement-breakpoint
ALTER TABLE "customer_order" ADD COLUMN "deposit_pence" integer;--> statement-breakpoint
ALTER TABLE "customer_order" ADD COLUMN "balance_pence" integer;--> statement-breakpoint
ALTER TABLE "customer_order" ADD COLUMN "provider_customer_id" text;--> statement-breakpoint
ALTER TABLE "customer_order" ADD COLUMN "provider_method_id" text;--> statement-breakpoint
ALTER TABLE "order_line" ADD COLUMN "discount_pence" integer DEFAULT 0 NOT NULL;--> statement-breakpoint
ALTER TABLE "payment" ADD COLUMN "charge_id" uuid;--> statement-breakpoint
ALTER TABLE "payment" ADD COLUMN "attempt" integer DEFAULT 1 NOT NULL;--> statement-breakpoint
ALTER TABLE "box_kind" ADD COLUMN "variant_of_id" uuid;--> statement-breakpoint
ALTER TABLE "delivery_area" ADD CONSTRAINT "delivery_area_point_id_collection_point_id_fk" FOREIGN KEY ("point_id") REFERENCES "public"."collection_point"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_addition" ADD CONSTRAINT "order_addition_order_id_customer_order_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."customer_order"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_addition_line" ADD CONSTRAINT "order_addition_line_addition_id_order_addition_id_fk" FOREIGN KEY ("addition_id") REFERENCES "public"."order_addition"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_addition_line" ADD CONSTRAINT "order_addition_line_offer_id_offer_id_fk" FOREIGN KEY ("offer_id") REFERENCES "public"."offer"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "promo_use" ADD CONSTRAINT "promo_use_order_id_customer_order_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."customer_order"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "promo_use" ADD CONSTRAINT "promo_use_promo_id_promo_code_id_fk" FOREIGN KEY ("promo_id") REFERENCES "public"."promo_code"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "promo_use" ADD CONSTRAINT "promo_use_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "order_addition_order_id_index" ON "order_addition" USING btree ("order_id");--> statement-breakpoint
CREATE UNIQUE INDEX "order_addition_one_open" ON "order_addition" USING btree ("order_id") WHERE "order_addition"."state" = 'open';--> statement-breakpoint
CREATE INDEX "order_addition_line_offer_id_index" ON "order_addition_line" USING btree ("offer_id");--> statement-breakpoint
CREATE INDEX "promo_use_promo_id_index" ON "promo_use" USING btree ("promo_id");--> statement-breakpoint
CREATE UNIQUE INDEX "promo_use_once_by_email" ON "promo_use" USING btree ("promo_id","email") WHERE "promo_use"."is_once";--> statement-breakpoint
CREATE UNIQUE INDEX "promo_use_once_by_account" ON "promo_use" USING btree ("promo_id","user_id") WHERE "promo_use"."is_once";--> statement-breakpoint
UPDATE "payment" SET "charge_id" = (
  SELECT "charge"."id" FROM "payment" AS "charge"
  WHERE "charge"."order_id" = "payment"."order_id" AND "charge"."kind" = 'charge' AND "charge"."state" = 'done'
  ORDER BY "charge"."amount_pence" >= "payment"."amount_pence" DESC, "charge"."created_at" DESC
  LIMIT 1
)
WHERE "payment"."kind" = 'refund';--> statement-breakpoint
ALTER TABLE "payment" ADD CONSTRAINT "payment_charge_id_payment_id_fk" FOREIGN KEY ("charge_id") REFERENCES "public"."payment"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "box_kind" ADD CONSTRAINT "box_kind_variant_of_id_box_kind_id_fk" FOREIGN KEY ("variant_of_id") REFERENCES "public"."box_kind"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "payment_one_balance" ON "payment" USING btree ("order_id") WHERE "payment"."kind" = 'charge' and "payment"."reason" = 'balance';--> statement-breakpoint
CREATE UNIQUE INDEX "payment_one_refund_per_reason" ON "payment" USING btree ("order_id","reason","charge_id") WHERE "payment"."kind" = 'refund';--> statement-breakpoint
ALTER TABLE "order_line" ADD CONSTRAINT "order_line_orderId_offerId_unitPricePence_unique" UNIQUE("order_id","offer_id","unit_price_pence");--> statement-breakpoint
ALTER TABLE "customer_order" ADD CONSTRAINT "order_sums" CHECK ("customer_order"."discount_pence" >= 0 and "customer_order"."delivery_pence" >= 0);--> statement-breakpoint
ALTER TABLE "customer_order" ADD CONSTRAINT "order_deposit" CHECK ("customer_order"."deposit_pence" > 0 and "customer_order"."deposit_pence" < "customer_order"."total_pence");--> statement-breakpoint
ALTER TABLE "customer_order" ADD CONSTRAINT "order_balance" CHECK ("customer_order"."balance_pence" is null or ("customer_order"."balance_pence" >= 0 and "customer_order"."deposit_pence" is not null));--> statement-breakpoint
ALTER TABLE "customer_order" ADD CONSTRAINT "order_delivery_address" CHECK (("customer_order"."delivery_address" is null) = ("customer_order"."delivery_postcode" is null));--> statement-breakpoint
ALTER TABLE "order_line" ADD CONSTRAINT "order_line_discount" CHECK ("order_line"."discount_pence" between 0 and "order_line"."quantity" * "order_line"."unit_price_pence");--> statement-breakpoint
ALTER TABLE "payment" ADD CONSTRAINT "payment_refund_has_charge" CHECK (("payment"."kind" = 'refund') = ("payment"."charge_id" is not null));--> statement-breakpoint
ALTER TABLE "box_kind" ADD CONSTRAINT "box_kind_variant" CHECK ("box_kind"."variant_of_id" <> "box_kind"."id");