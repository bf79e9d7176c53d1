CREATE TABLE "allocation" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"cutting_day_id" uuid NOT NULL,
	"figures_version" integer NOT NULL,
	"locks" jsonb NOT NULL,
	"input" jsonb NOT NULL,
	"plan" jsonb NOT NULL,
	"contribution_pence" integer NOT NULL,
	"is_proven" boolean NOT NULL,
	"state" text DEFAULT 'draft' NOT NULL,
	"published_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "offer" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"cutting_day_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"product_key" text NOT NULL,
	"box_kind_id" uuid,
	"cut_id" text,
	"carcase_id" uuid,
	"unit" text,
	"offered" integer NOT NULL,
	"held" integer DEFAULT 0 NOT NULL,
	"sold" integer DEFAULT 0 NOT NULL,
	"price_pence" integer,
	"upper_grams" integer,
	"is_closed" boolean DEFAULT false NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "offer_cuttingDayId_productKey_unique" UNIQUE("cutting_day_id","product_key"),
	CONSTRAINT "offer_never_twice" CHECK ("offer"."held" >= 0 and "offer"."sold" >= 0 and "offer"."held" + "offer"."sold" <= "offer"."offered"),
	CONSTRAINT "offer_unit_once" CHECK ("offer"."kind" <> 'unit' or "offer"."offered" <= 1),
	CONSTRAINT "offer_product" CHECK (("offer"."kind" = 'box') = ("offer"."box_kind_id" is not null)
        and ("offer"."kind" in ('loose', 'cut')) = ("offer"."cut_id" is not null)
        and ("offer"."kind" = 'unit') = ("offer"."carcase_id" is not null and "offer"."unit" is not null)),
	CONSTRAINT "offer_price" CHECK ("offer"."kind" not in ('box', 'loose') or "offer"."price_pence" > 0)
);
--> statement-breakpoint
CREATE TABLE "audit_entry" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"by_user_id" uuid,
	"action" text NOT NULL,
	"subject" text NOT NULL,
	"subject_id" text NOT NULL,
	"detail" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "account" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"account_id" text NOT NULL,
	"provider_id" text NOT NULL,
	"user_id" uuid NOT NULL,
	"access_token" text,
	"refresh_token" text,
	"id_token" text,
	"access_token_expires_at" timestamp with time zone,
	"refresh_token_expires_at" timestamp with time zone,
	"scope" text,
	"password" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "rate_limit" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"key" text NOT NULL,
	"count" integer NOT NULL,
	"last_request" bigint NOT NULL,
	CONSTRAINT "rate_limit_key_unique" UNIQUE("key")
);
--> statement-breakpoint
CREATE TABLE "session" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"token" text NOT NULL,
	"user_id" uuid NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"ip_address" text,
	"user_agent" text,
	"impersonated_by" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "session_token_unique" UNIQUE("token")
);
--> statement-breakpoint
CREATE TABLE "user" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"email_verified" boolean DEFAULT false NOT NULL,
	"image" text,
	"role" text DEFAULT 'customer' NOT NULL,
	"banned" boolean DEFAULT false,
	"ban_reason" text,
	"ban_expires" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "user_email_unique" UNIQUE("email")
);
--> statement-breakpoint
CREATE TABLE "verification" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"identifier" text NOT NULL,
	"value" text NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "carcase" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"animal_id" uuid NOT NULL,
	"cutting_day_id" uuid NOT NULL,
	"kill_day" date NOT NULL,
	"state" text DEFAULT 'booked' NOT NULL,
	"live_grams" integer NOT NULL,
	"hot_grams" integer,
	"cold_grams" integer,
	"conformation" text,
	"fat_class" text,
	"dressing_spec" text,
	"hanging" text DEFAULT 'whole side' NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "carcase_animalId_unique" UNIQUE("animal_id"),
	CONSTRAINT "carcase_live_grams" CHECK ("carcase"."live_grams" between 100000 and 1500000),
	CONSTRAINT "carcase_hot_grams" CHECK ("carcase"."hot_grams" is null or "carcase"."hot_grams" between 50000 and 715000),
	CONSTRAINT "carcase_cold_grams" CHECK ("carcase"."cold_grams" is null or "carcase"."cold_grams" between 50000 and 700000)
);
--> statement-breakpoint
CREATE TABLE "cutting_day" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"day" date NOT NULL,
	"cut_off_at" timestamp with time zone NOT NULL,
	"state" text DEFAULT 'planned' NOT NULL,
	"specification_id" uuid NOT NULL,
	"figures_version" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "cutting_day_day_unique" UNIQUE("day"),
	CONSTRAINT "cutting_day_figures_version" CHECK ("cutting_day"."figures_version" > 0)
);
--> statement-breakpoint
CREATE TABLE "cutting_specification" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"edition" integer NOT NULL,
	"body" jsonb NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "cutting_specification_name_edition_unique" UNIQUE("name","edition")
);
--> statement-breakpoint
CREATE TABLE "weighing" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"carcase_id" uuid NOT NULL,
	"node" text NOT NULL,
	"grams" integer NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "weighing_carcaseId_node_unique" UNIQUE("carcase_id","node"),
	CONSTRAINT "weighing_grams" CHECK ("weighing"."grams" between 0 and 360000)
);
--> statement-breakpoint
CREATE TABLE "dated_setting" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"key" text NOT NULL,
	"valid_from" date NOT NULL,
	"value" jsonb NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "dated_setting_key_validFrom_unique" UNIQUE("key","valid_from")
);
--> statement-breakpoint
CREATE TABLE "farm" (
	"id" integer PRIMARY KEY DEFAULT 1 NOT NULL,
	"name" text NOT NULL,
	"business_name" text NOT NULL,
	"address_lines" text[] NOT NULL,
	"email" text NOT NULL,
	"phone" text NOT NULL,
	"story" text NOT NULL,
	"abattoir_name" text NOT NULL,
	"abattoir_approval_no" text NOT NULL,
	"cutter_name" text NOT NULL,
	"cutter_approval_no" text NOT NULL,
	"serving_grams" integer NOT NULL,
	"freezer_grams_per_litre" integer NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "farm_single_row" CHECK ("farm"."id" = 1),
	CONSTRAINT "farm_portions" CHECK ("farm"."serving_grams" > 0 and "farm"."freezer_grams_per_litre" > 0)
);
--> statement-breakpoint
CREATE TABLE "animal" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"ear_tag" text NOT NULL,
	"breed" text NOT NULL,
	"sex" text NOT NULL,
	"born" date NOT NULL,
	"dam_ear_tag" text,
	"live_grams" integer,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "animal_earTag_unique" UNIQUE("ear_tag"),
	CONSTRAINT "animal_ear_tag_form" CHECK ("animal"."ear_tag" ~ '^UK[0-9]{12}$'),
	CONSTRAINT "animal_dam_form" CHECK ("animal"."dam_ear_tag" is null or "animal"."dam_ear_tag" ~ '^UK[0-9]{12}$'),
	CONSTRAINT "animal_live_grams" CHECK ("animal"."live_grams" is null or "animal"."live_grams" between 100000 and 1500000)
);
--> statement-breakpoint
CREATE TABLE "medicine_record" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"animal_id" uuid NOT NULL,
	"product" text NOT NULL,
	"given_on" date NOT NULL,
	"withdrawal_days" integer NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "medicine_withdrawal_days" CHECK ("medicine_record"."withdrawal_days" between 0 and 365)
);
--> statement-breakpoint
CREATE TABLE "mail_message" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"event_key" text NOT NULL,
	"kind" text NOT NULL,
	"order_id" uuid,
	"to_address" text NOT NULL,
	"subject" text NOT NULL,
	"text" text NOT NULL,
	"html" text NOT NULL,
	"attachments" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"message_id" text NOT NULL,
	"state" text DEFAULT 'queued' NOT NULL,
	"attempts" integer DEFAULT 0 NOT NULL,
	"last_error" text,
	"sent_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "mail_message_eventKey_unique" UNIQUE("event_key"),
	CONSTRAINT "mail_message_messageId_unique" UNIQUE("message_id"),
	CONSTRAINT "mail_single_line_headers" CHECK ("mail_message"."to_address" !~ '[
]' and "mail_message"."subject" !~ '[
]')
);
--> statement-breakpoint
CREATE TABLE "collection_point" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"address_lines" text[] NOT NULL,
	"directions" text NOT NULL,
	"bring" text NOT NULL,
	"is_active" boolean DEFAULT true NOT NULL
);
--> statement-breakpoint
CREATE TABLE "collection_slot" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"point_id" uuid NOT NULL,
	"cutting_day_id" uuid NOT NULL,
	"starts_at" timestamp with time zone NOT NULL,
	"ends_at" timestamp with time zone NOT NULL,
	"capacity" integer NOT NULL,
	"taken" integer DEFAULT 0 NOT NULL,
	CONSTRAINT "collection_slot_pointId_startsAt_unique" UNIQUE("point_id","starts_at"),
	CONSTRAINT "slot_never_over" CHECK ("collection_slot"."taken" >= 0 and "collection_slot"."taken" <= "collection_slot"."capacity"),
	CONSTRAINT "slot_times" CHECK ("collection_slot"."ends_at" > "collection_slot"."starts_at")
);
--> statement-breakpoint
CREATE TABLE "customer_order" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"order_no" integer GENERATED ALWAYS AS IDENTITY (sequence name "customer_order_order_no_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 2147483647 START WITH 1001 CACHE 1),
	"token" text NOT NULL,
	"basket_key" uuid NOT NULL,
	"user_id" uuid,
	"cutting_day_id" uuid NOT NULL,
	"slot_id" uuid NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"phone" text NOT NULL,
	"note" text DEFAULT '' NOT NULL,
	"state" text DEFAULT 'awaiting payment' NOT NULL,
	"payment_state" text DEFAULT 'unpaid' NOT NULL,
	"total_pence" integer NOT NULL,
	"reached_payment_at" timestamp with time zone NOT NULL,
	"is_held" boolean DEFAULT true NOT NULL,
	"session_id" text,
	"session_url" text,
	"session_expires_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "customer_order_orderNo_unique" UNIQUE("order_no"),
	CONSTRAINT "customer_order_token_unique" UNIQUE("token"),
	CONSTRAINT "customer_order_basketKey_unique" UNIQUE("basket_key"),
	CONSTRAINT "customer_order_sessionId_unique" UNIQUE("session_id"),
	CONSTRAINT "order_total" CHECK ("customer_order"."total_pence" > 0),
	CONSTRAINT "order_held_only_before_payment" CHECK (not "customer_order"."is_held" or "customer_order"."state" = 'awaiting payment')
);
--> statement-breakpoint
CREATE TABLE "order_line" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"order_id" uuid NOT NULL,
	"offer_id" uuid NOT NULL,
	"quantity" integer NOT NULL,
	"unit_price_pence" integer NOT NULL,
	"name" text NOT NULL,
	CONSTRAINT "order_line_orderId_offerId_unique" UNIQUE("order_id","offer_id"),
	CONSTRAINT "order_line_quantity" CHECK ("order_line"."quantity" > 0),
	CONSTRAINT "order_line_price" CHECK ("order_line"."unit_price_pence" > 0)
);
--> statement-breakpoint
CREATE TABLE "payment" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"order_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"provider_id" text,
	"reason" text NOT NULL,
	"amount_pence" integer NOT NULL,
	"state" text NOT NULL,
	"error" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "payment_providerId_unique" UNIQUE("provider_id"),
	CONSTRAINT "payment_amount" CHECK ("payment"."amount_pence" > 0)
);
--> statement-breakpoint
CREATE TABLE "webhook_event" (
	"event_id" text PRIMARY KEY NOT NULL,
	"type" text NOT NULL,
	"payload" jsonb NOT NULL,
	"received_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "pack" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"code" text NOT NULL,
	"cutting_day_id" uuid NOT NULL,
	"carcase_id" uuid NOT NULL,
	"cut_id" text NOT NULL,
	"grams" integer NOT NULL,
	"packed_on" date NOT NULL,
	"use_by" date NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "pack_code_unique" UNIQUE("code"),
	CONSTRAINT "pack_grams" CHECK ("pack"."grams" between 1 and 60000),
	CONSTRAINT "pack_dates" CHECK ("pack"."use_by" >= "pack"."packed_on")
);
--> statement-breakpoint
CREATE TABLE "pack_assignment" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"pack_id" uuid NOT NULL,
	"order_line_id" uuid,
	"reservation_line_id" uuid,
	"copy" integer DEFAULT 1 NOT NULL,
	"box_line" text DEFAULT '' NOT NULL,
	"is_live" boolean DEFAULT true NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "pack_assignment_one_line" CHECK (num_nonnulls("pack_assignment"."order_line_id", "pack_assignment"."reservation_line_id") = 1),
	CONSTRAINT "pack_assignment_copy" CHECK ("pack_assignment"."copy" > 0)
);
--> statement-breakpoint
CREATE TABLE "stock_movement" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"carcase_id" uuid NOT NULL,
	"pack_id" uuid,
	"from_place" text,
	"to_place" text NOT NULL,
	"grams" integer NOT NULL,
	"reason" text NOT NULL,
	"by_user_id" uuid,
	"reversal_of" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "stock_movement_reversalOf_unique" UNIQUE("reversal_of"),
	CONSTRAINT "stock_movement_grams" CHECK ("stock_movement"."grams" > 0),
	CONSTRAINT "stock_movement_places" CHECK ("stock_movement"."from_place" is distinct from "stock_movement"."to_place")
);
--> statement-breakpoint
CREATE TABLE "box_kind" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"slug" text NOT NULL,
	"name" text NOT NULL,
	"summary" text NOT NULL,
	"guaranteed_grams" integer NOT NULL,
	"price_pence" integer NOT NULL,
	"packaging_pence" integer NOT NULL,
	"demand_boxes" integer NOT NULL,
	"is_active" boolean DEFAULT true NOT NULL,
	"position" integer NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "box_kind_slug_unique" UNIQUE("slug"),
	CONSTRAINT "box_kind_grams" CHECK ("box_kind"."guaranteed_grams" > 0),
	CONSTRAINT "box_kind_money" CHECK ("box_kind"."price_pence" > 0 and "box_kind"."packaging_pence" >= 0),
	CONSTRAINT "box_kind_demand" CHECK ("box_kind"."demand_boxes" >= 0)
);
--> statement-breakpoint
CREATE TABLE "box_line" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"box_kind_id" uuid NOT NULL,
	"position" integer NOT NULL,
	"name" text NOT NULL,
	"min_grams" integer NOT NULL,
	"max_grams" integer NOT NULL,
	"min_packs" integer NOT NULL,
	"max_packs" integer,
	CONSTRAINT "box_line_boxKindId_position_unique" UNIQUE("box_kind_id","position"),
	CONSTRAINT "box_line_grams" CHECK ("box_line"."min_grams" >= 0 and "box_line"."max_grams" >= "box_line"."min_grams"),
	CONSTRAINT "box_line_packs" CHECK ("box_line"."min_packs" >= 0 and coalesce("box_line"."max_packs" >= "box_line"."min_packs", true))
);
--> statement-breakpoint
CREATE TABLE "box_line_cut" (
	"box_line_id" uuid NOT NULL,
	"cut_id" text NOT NULL,
	CONSTRAINT "box_line_cut_box_line_id_cut_id_pk" PRIMARY KEY("box_line_id","cut_id")
);
--> statement-breakpoint
CREATE TABLE "cut" (
	"id" text PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"description" text NOT NULL,
	"cooking" text NOT NULL,
	"tenth_pence_per_kg" integer NOT NULL,
	"clearance_tenth_pence_per_kg" integer NOT NULL,
	"min_pack_grams" integer NOT NULL,
	"max_pack_grams" integer NOT NULL,
	"loose_demand_packs" integer NOT NULL,
	"is_sold_loose" boolean NOT NULL,
	"is_farm_minced" boolean NOT NULL,
	"use_by_days" integer NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "cut_prices" CHECK ("cut"."tenth_pence_per_kg" >= 0 and "cut"."clearance_tenth_pence_per_kg" >= 0),
	CONSTRAINT "cut_pack" CHECK ("cut"."min_pack_grams" > 0 and "cut"."max_pack_grams" >= "cut"."min_pack_grams"),
	CONSTRAINT "cut_demand" CHECK ("cut"."loose_demand_packs" >= 0 and "cut"."use_by_days" > 0)
);
--> statement-breakpoint
CREATE TABLE "reservation" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"reservation_no" integer GENERATED ALWAYS AS IDENTITY (sequence name "reservation_reservation_no_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 2147483647 START WITH 501 CACHE 1),
	"account_id" uuid NOT NULL,
	"cutting_day_id" uuid NOT NULL,
	"request_key" uuid NOT NULL,
	"state" text NOT NULL,
	"cutting_note" text DEFAULT '' NOT NULL,
	"answer" text DEFAULT '' NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "reservation_reservationNo_unique" UNIQUE("reservation_no"),
	CONSTRAINT "reservation_requestKey_unique" UNIQUE("request_key")
);
--> statement-breakpoint
CREATE TABLE "reservation_line" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"reservation_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"unit_kind" text,
	"carcase_id" uuid,
	"side" text,
	"cut_id" text,
	"grams" integer,
	"tenth_pence_per_kg" integer NOT NULL,
	CONSTRAINT "reservation_line_kind" CHECK (case when "reservation_line"."kind" = 'unit'
        then "reservation_line"."unit_kind" is not null and "reservation_line"."cut_id" is null and "reservation_line"."grams" is null
        else "reservation_line"."cut_id" is not null and "reservation_line"."grams" > 0 and "reservation_line"."unit_kind" is null end),
	CONSTRAINT "reservation_line_rate" CHECK ("reservation_line"."tenth_pence_per_kg" > 0)
);
--> statement-breakpoint
CREATE TABLE "trade_account" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"user_id" uuid NOT NULL,
	"business_name" text NOT NULL,
	"address_lines" text[] NOT NULL,
	"phone" text NOT NULL,
	"state" text DEFAULT 'applied' NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "trade_account_userId_unique" UNIQUE("user_id")
);
--> statement-breakpoint
CREATE TABLE "trade_price" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"account_id" uuid NOT NULL,
	"product" text NOT NULL,
	"tenth_pence_per_kg" integer NOT NULL,
	"basis" text DEFAULT 'scale weight' NOT NULL,
	CONSTRAINT "trade_price_accountId_product_unique" UNIQUE("account_id","product"),
	CONSTRAINT "trade_price_rate" CHECK ("trade_price"."tenth_pence_per_kg" > 0)
);
--> statement-breakpoint
ALTER TABLE "allocation" ADD CONSTRAINT "allocation_cutting_day_id_cutting_day_id_fk" FOREIGN KEY ("cutting_day_id") REFERENCES "public"."cutting_day"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "offer" ADD CONSTRAINT "offer_cutting_day_id_cutting_day_id_fk" FOREIGN KEY ("cutting_day_id") REFERENCES "public"."cutting_day"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "offer" ADD CONSTRAINT "offer_box_kind_id_box_kind_id_fk" FOREIGN KEY ("box_kind_id") REFERENCES "public"."box_kind"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "offer" ADD CONSTRAINT "offer_cut_id_cut_id_fk" FOREIGN KEY ("cut_id") REFERENCES "public"."cut"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "offer" ADD CONSTRAINT "offer_carcase_id_carcase_id_fk" FOREIGN KEY ("carcase_id") REFERENCES "public"."carcase"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "audit_entry" ADD CONSTRAINT "audit_entry_by_user_id_user_id_fk" FOREIGN KEY ("by_user_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "account" ADD CONSTRAINT "account_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "session" ADD CONSTRAINT "session_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "carcase" ADD CONSTRAINT "carcase_animal_id_animal_id_fk" FOREIGN KEY ("animal_id") REFERENCES "public"."animal"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "carcase" ADD CONSTRAINT "carcase_cutting_day_id_cutting_day_id_fk" FOREIGN KEY ("cutting_day_id") REFERENCES "public"."cutting_day"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "cutting_day" ADD CONSTRAINT "cutting_day_specification_id_cutting_specification_id_fk" FOREIGN KEY ("specification_id") REFERENCES "public"."cutting_specification"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "weighing" ADD CONSTRAINT "weighing_carcase_id_carcase_id_fk" FOREIGN KEY ("carcase_id") REFERENCES "public"."carcase"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "medicine_record" ADD CONSTRAINT "medicine_record_animal_id_animal_id_fk" FOREIGN KEY ("animal_id") REFERENCES "public"."animal"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "mail_message" ADD CONSTRAINT "mail_message_order_id_customer_order_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."customer_order"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "collection_slot" ADD CONSTRAINT "collection_slot_point_id_collection_point_id_fk" FOREIGN KEY ("point_id") REFERENCES "public"."collection_point"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "collection_slot" ADD CONSTRAINT "collection_slot_cutting_day_id_cutting_day_id_fk" FOREIGN KEY ("cutting_day_id") REFERENCES "public"."cutting_day"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "customer_order" ADD CONSTRAINT "customer_order_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "customer_order" ADD CONSTRAINT "customer_order_cutting_day_id_cutting_day_id_fk" FOREIGN KEY ("cutting_day_id") REFERENCES "public"."cutting_day"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "customer_order" ADD CONSTRAINT "customer_order_slot_id_collection_slot_id_fk" FOREIGN KEY ("slot_id") REFERENCES "public"."collection_slot"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_line" ADD CONSTRAINT "order_line_order_id_customer_order_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."customer_order"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_line" ADD CONSTRAINT "order_line_offer_id_offer_id_fk" FOREIGN KEY ("offer_id") REFERENCES "public"."offer"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "payment" ADD CONSTRAINT "payment_order_id_customer_order_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."customer_order"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pack" ADD CONSTRAINT "pack_cutting_day_id_cutting_day_id_fk" FOREIGN KEY ("cutting_day_id") REFERENCES "public"."cutting_day"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pack" ADD CONSTRAINT "pack_carcase_id_carcase_id_fk" FOREIGN KEY ("carcase_id") REFERENCES "public"."carcase"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pack" ADD CONSTRAINT "pack_cut_id_cut_id_fk" FOREIGN KEY ("cut_id") REFERENCES "public"."cut"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pack_assignment" ADD CONSTRAINT "pack_assignment_pack_id_pack_id_fk" FOREIGN KEY ("pack_id") REFERENCES "public"."pack"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pack_assignment" ADD CONSTRAINT "pack_assignment_order_line_id_order_line_id_fk" FOREIGN KEY ("order_line_id") REFERENCES "public"."order_line"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pack_assignment" ADD CONSTRAINT "pack_assignment_reservation_line_id_reservation_line_id_fk" FOREIGN KEY ("reservation_line_id") REFERENCES "public"."reservation_line"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "stock_movement" ADD CONSTRAINT "stock_movement_carcase_id_carcase_id_fk" FOREIGN KEY ("carcase_id") REFERENCES "public"."carcase"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "stock_movement" ADD CONSTRAINT "stock_movement_pack_id_pack_id_fk" FOREIGN KEY ("pack_id") REFERENCES "public"."pack"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "stock_movement" ADD CONSTRAINT "stock_movement_by_user_id_user_id_fk" FOREIGN KEY ("by_user_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "box_line" ADD CONSTRAINT "box_line_box_kind_id_box_kind_id_fk" FOREIGN KEY ("box_kind_id") REFERENCES "public"."box_kind"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "box_line_cut" ADD CONSTRAINT "box_line_cut_box_line_id_box_line_id_fk" FOREIGN KEY ("box_line_id") REFERENCES "public"."box_line"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "box_line_cut" ADD CONSTRAINT "box_line_cut_cut_id_cut_id_fk" FOREIGN KEY ("cut_id") REFERENCES "public"."cut"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reservation" ADD CONSTRAINT "reservation_account_id_trade_account_id_fk" FOREIGN KEY ("account_id") REFERENCES "public"."trade_account"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reservation" ADD CONSTRAINT "reservation_cutting_day_id_cutting_day_id_fk" FOREIGN KEY ("cutting_day_id") REFERENCES "public"."cutting_day"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reservation_line" ADD CONSTRAINT "reservation_line_reservation_id_reservation_id_fk" FOREIGN KEY ("reservation_id") REFERENCES "public"."reservation"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reservation_line" ADD CONSTRAINT "reservation_line_carcase_id_carcase_id_fk" FOREIGN KEY ("carcase_id") REFERENCES "public"."carcase"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reservation_line" ADD CONSTRAINT "reservation_line_cut_id_cut_id_fk" FOREIGN KEY ("cut_id") REFERENCES "public"."cut"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "trade_account" ADD CONSTRAINT "trade_account_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "trade_price" ADD CONSTRAINT "trade_price_account_id_trade_account_id_fk" FOREIGN KEY ("account_id") REFERENCES "public"."trade_account"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "allocation_cutting_day_id_created_at_index" ON "allocation" USING btree ("cutting_day_id","created_at");--> statement-breakpoint
CREATE UNIQUE INDEX "allocation_one_published" ON "allocation" USING btree ("cutting_day_id") WHERE "allocation"."state" = 'published';--> statement-breakpoint
CREATE INDEX "audit_entry_subject_subject_id_index" ON "audit_entry" USING btree ("subject","subject_id");--> statement-breakpoint
CREATE INDEX "audit_entry_created_at_index" ON "audit_entry" USING btree ("created_at");--> statement-breakpoint
CREATE INDEX "account_user_id_index" ON "account" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "session_user_id_index" ON "session" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "verification_identifier_index" ON "verification" USING btree ("identifier");--> statement-breakpoint
CREATE INDEX "carcase_cutting_day_id_index" ON "carcase" USING btree ("cutting_day_id");--> statement-breakpoint
CREATE INDEX "medicine_record_animal_id_index" ON "medicine_record" USING btree ("animal_id");--> statement-breakpoint
CREATE INDEX "mail_message_order_id_index" ON "mail_message" USING btree ("order_id");--> statement-breakpoint
CREATE INDEX "mail_message_state_index" ON "mail_message" USING btree ("state");--> statement-breakpoint
CREATE INDEX "collection_slot_cutting_day_id_index" ON "collection_slot" USING btree ("cutting_day_id");--> statement-breakpoint
CREATE INDEX "customer_order_cutting_day_id_state_index" ON "customer_order" USING btree ("cutting_day_id","state");--> statement-breakpoint
CREATE INDEX "customer_order_user_id_index" ON "customer_order" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "order_line_offer_id_index" ON "order_line" USING btree ("offer_id");--> statement-breakpoint
CREATE INDEX "payment_order_id_index" ON "payment" USING btree ("order_id");--> statement-breakpoint
CREATE UNIQUE INDEX "payment_one_refund_per_reason" ON "payment" USING btree ("order_id","reason") WHERE "payment"."kind" = 'refund';--> statement-breakpoint
CREATE INDEX "pack_cutting_day_id_index" ON "pack" USING btree ("cutting_day_id");--> statement-breakpoint
CREATE INDEX "pack_carcase_id_index" ON "pack" USING btree ("carcase_id");--> statement-breakpoint
CREATE UNIQUE INDEX "pack_one_live_assignment" ON "pack_assignment" USING btree ("pack_id") WHERE "pack_assignment"."is_live";--> statement-breakpoint
CREATE INDEX "pack_assignment_order_line_id_index" ON "pack_assignment" USING btree ("order_line_id");--> statement-breakpoint
CREATE INDEX "pack_assignment_reservation_line_id_index" ON "pack_assignment" USING btree ("reservation_line_id");--> statement-breakpoint
CREATE INDEX "stock_movement_carcase_id_index" ON "stock_movement" USING btree ("carcase_id");--> statement-breakpoint
CREATE INDEX "stock_movement_pack_id_index" ON "stock_movement" USING btree ("pack_id");--> statement-breakpoint
CREATE INDEX "reservation_cutting_day_id_state_index" ON "reservation" USING btree ("cutting_day_id","state");--> statement-breakpoint
CREATE INDEX "reservation_account_id_index" ON "reservation" USING btree ("account_id");--> statement-breakpoint
CREATE INDEX "reservation_line_reservation_id_index" ON "reservation_line" USING btree ("reservation_id");