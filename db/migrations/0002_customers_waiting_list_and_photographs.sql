CREATE TABLE "consent_entry" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"contact_id" uuid NOT NULL,
	"is_given" boolean NOT NULL,
	"wording_version" integer NOT NULL,
	"source" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "customer_profile" (
	"user_id" uuid PRIMARY KEY NOT NULL,
	"phone" text NOT NULL
);
--> statement-breakpoint
CREATE TABLE "marketing_contact" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"email" text NOT NULL,
	"token" text NOT NULL,
	"is_subscribed" boolean NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "marketing_contact_email_unique" UNIQUE("email"),
	CONSTRAINT "marketing_contact_token_unique" UNIQUE("token"),
	CONSTRAINT "marketing_contact_lower_case" CHECK ("marketing_contact"."email" = lower("marketing_contact"."email"))
);
--> statement-breakpoint
CREATE TABLE "order_feedback" (
	"order_id" uuid PRIMARY KEY NOT NULL,
	"stars" integer NOT NULL,
	"words" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "order_feedback_stars" CHECK ("order_feedback"."stars" between 1 and 5)
);
--> statement-breakpoint
CREATE TABLE "box_photograph" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"box_kind_id" uuid NOT NULL,
	"hash" text NOT NULL,
	"content_type" text NOT NULL,
	"bytes" "bytea" NOT NULL,
	"width" integer NOT NULL,
	"height" integer NOT NULL,
	"alt" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "box_photograph_boxKindId_hash_unique" UNIQUE("box_kind_id","hash"),
	CONSTRAINT "box_photograph_size" CHECK (octet_length("box_photograph"."bytes") between 1 and 2000000),
	CONSTRAINT "box_photograph_pixels" CHECK ("box_photograph"."width" between 1 and 4000 and "box_photograph"."height" between 1 and 4000),
	CONSTRAINT "box_photograph_hash" CHECK ("box_photograph"."hash" ~ '^[0-9a-f]{64}$')
);
--> statement-breakpoint
CREATE TABLE "waiting_entry" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"place" bigint GENERATED ALWAYS AS IDENTITY (sequence name "waiting_entry_place_seq" INCREMENT BY 1 MINVALUE 1 MAXVALUE 9223372036854775807 START WITH 1 CACHE 1),
	"box_kind_id" uuid NOT NULL,
	"cutting_day_id" uuid,
	"email" text NOT NULL,
	"token" text NOT NULL,
	"state" text DEFAULT 'unconfirmed' NOT NULL,
	"offer_id" uuid,
	"held_until" timestamp with time zone,
	"order_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "waiting_entry_place_unique" UNIQUE("place"),
	CONSTRAINT "waiting_entry_token_unique" UNIQUE("token"),
	CONSTRAINT "waiting_entry_share" CHECK (("waiting_entry"."state" = 'offered') = ("waiting_entry"."held_until" is not null)
        and ("waiting_entry"."state" not in ('offered', 'taken') or "waiting_entry"."offer_id" is not null)),
	CONSTRAINT "waiting_entry_taken" CHECK (("waiting_entry"."state" = 'taken') = ("waiting_entry"."order_id" is not null))
);
--> statement-breakpoint
ALTER TABLE "mail_message" ADD COLUMN "unsubscribe_url" text;--> statement-breakpoint
ALTER TABLE "consent_entry" ADD CONSTRAINT "consent_entry_contact_id_marketing_contact_id_fk" FOREIGN KEY ("contact_id") REFERENCES "public"."marketing_contact"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "customer_profile" ADD CONSTRAINT "customer_profile_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_feedback" ADD CONSTRAINT "order_feedback_order_id_customer_order_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."customer_order"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "box_photograph" ADD CONSTRAINT "box_photograph_box_kind_id_box_kind_id_fk" FOREIGN KEY ("box_kind_id") REFERENCES "public"."box_kind"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "waiting_entry" ADD CONSTRAINT "waiting_entry_box_kind_id_box_kind_id_fk" FOREIGN KEY ("box_kind_id") REFERENCES "public"."box_kind"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "waiting_entry" ADD CONSTRAINT "waiting_entry_cutting_day_id_cutting_day_id_fk" FOREIGN KEY ("cutting_day_id") REFERENCES "public"."cutting_day"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "waiting_entry" ADD CONSTRAINT "waiting_entry_offer_id_offer_id_fk" FOREIGN KEY ("offer_id") REFERENCES "public"."offer"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "waiting_entry" ADD CONSTRAINT "waiting_entry_order_id_customer_order_id_fk" FOREIGN KEY ("order_id") REFERENCES "public"."customer_order"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "consent_entry_contact_id_created_at_index" ON "consent_entry" USING btree ("contact_id","created_at");--> statement-breakpoint
CREATE INDEX "box_photograph_hash_index" ON "box_photograph" USING btree ("hash");--> statement-breakpoint
CREATE UNIQUE INDEX "waiting_entry_once" ON "waiting_entry" USING btree ("email","box_kind_id",coalesce("cutting_day_id", '00000000-0000-0000-0000-000000000000')) WHERE "waiting_entry"."state" in ('unconfirmed', 'waiting', 'offered');--> statement-breakpoint
CREATE INDEX "waiting_entry_state_place_index" ON "waiting_entry" USING btree ("state","place");--> statement-breakpoint
CREATE INDEX "waiting_entry_offer_id_index" ON "waiting_entry" USING btree ("offer_id");