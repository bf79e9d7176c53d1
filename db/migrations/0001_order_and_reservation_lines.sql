ALTER TABLE "order_line" ADD COLUMN "unit_grams" integer;--> statement-breakpoint
UPDATE "order_line" SET "unit_grams" = coalesce("box_kind"."guaranteed_grams", "offer"."upper_grams")
FROM "offer" LEFT JOIN "box_kind" ON "box_kind"."id" = "offer"."box_kind_id"
WHERE "offer"."id" = "order_line"."offer_id";--> statement-breakpoint
ALTER TABLE "order_line" ALTER COLUMN "unit_grams" SET NOT NULL;--> statement-breakpoint
ALTER TABLE "reservation_line" ADD COLUMN "basis" text DEFAULT 'scale weight' NOT NULL;--> statement-breakpoint
UPDATE "reservation_line" SET "basis" = "trade_price"."basis"
FROM "reservation" JOIN "trade_price" ON "trade_price"."account_id" = "reservation"."account_id"
WHERE "reservation"."id" = "reservation_line"."reservation_id" AND "trade_price"."product" = "reservation_line"."unit_kind";--> statement-breakpoint
ALTER TABLE "reservation_line" ADD COLUMN "dispatched_grams" integer;--> statement-breakpoint
UPDATE "reservation_line" SET "dispatched_grams" = (
  SELECT coalesce(sum("stock_movement"."grams"), 0)
  FROM "stock_movement"
  LEFT JOIN "pack_assignment" ON "pack_assignment"."pack_id" = "stock_movement"."pack_id" AND "pack_assignment"."is_live"
  WHERE "stock_movement"."to_place" = 'trade' AND (
    "pack_assignment"."reservation_line_id" = "reservation_line"."id"
    OR ("stock_movement"."pack_id" IS NULL AND "stock_movement"."carcase_id" = "reservation_line"."carcase_id"
      AND "stock_movement"."reason" = 'reservation ' || "reservation"."reservation_no" || ': ' || "reservation_line"."side" || ' ' || "reservation_line"."unit_kind")
  )
)
FROM "reservation"
WHERE "reservation"."id" = "reservation_line"."reservation_id" AND "reservation"."state" = 'dispatched';--> statement-breakpoint
ALTER TABLE "order_line" ADD CONSTRAINT "order_line_grams" CHECK ("order_line"."unit_grams" > 0);--> statement-breakpoint
ALTER TABLE "reservation_line" ADD CONSTRAINT "reservation_line_basis" CHECK ("reservation_line"."kind" = 'unit' or "reservation_line"."basis" = 'scale weight');--> statement-breakpoint
ALTER TABLE "reservation_line" ADD CONSTRAINT "reservation_line_dispatched" CHECK ("reservation_line"."dispatched_grams" >= 0);
