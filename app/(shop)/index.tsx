import { useLoaderData } from 'expo-router';
import type { GenerateMetadataFunction } from 'expo-server';
import { View } from 'react-native';
import type { ShopHome } from '#shared/contracts/shop.ts';
import { BoxRow } from '#components/boxes/box-row.tsx';
import { FarmStory } from '#components/shop/farm-story.tsx';
import { HomeWaiting } from '#components/shop/home-waiting.tsx';
import { HowItWorks } from '#components/shop/how-it-works.tsx';
import { LaterDays } from '#components/shop/later-days.tsx';
import { LoadedView } from '#components/shop/loaded-view.tsx';
import { NextCutting } from '#components/shop/next-cutting.tsx';
import { nextDayOf } from '#components/shop/next-day.ts';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Text } from '#components/ui/text.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { load } from '#hooks/loaded.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { useShopHome } from '#hooks/shop.ts';
import { useTitle } from '#hooks/use-title.ts';
import { getShopHome } from '#shared/contracts/shop.ts';

const TITLE = 'Skelderwick Farm · beef by the box, from our own cattle';

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, {
    title: TITLE,
    description:
      'Boxes and loose cuts of beef from our own herd: what is coming, when it is ready, how many are left. Order on your phone, collect at your time.',
  });

export async function loader() {
  return load(getShopHome, {});
}

export default function HomeScreen() {
  const loaded = useLoaderData<typeof loader>();
  const query = useShopHome(loaded);
  useTitle(TITLE);
  return (
    <ShopPage farm={query.data?.farm ?? null}>
      <LoadedView loaded={loaded} query={query} what="what is coming" waiting={<HomeWaiting />}>
        {(home) => <Home home={home} />}
      </LoadedView>
    </ShopPage>
  );
}

function Home({ home }: { home: ShopHome }) {
  const day = nextDayOf(home.days);
  return (
    <View style={css('w-sections')}>
      {day ? <NextCutting day={day} /> : <NothingYet />}
      <View style={css('w-section')}>
        <Heading level={2}>Boxes</Heading>
        <View style={css('w-goods')}>
          {home.boxes.map((box) => (
            <BoxRow key={box.slug} box={box} day={day} />
          ))}
        </View>
        <TextLink href="/cuts" place="alone" icon="forward">
          Loose cuts, by the pack
        </TextLink>
        <LaterDays days={home.days.filter((one) => one.isInTime && one.id !== day?.id)} />
      </View>
      <HowItWorks />
      <FarmStory farm={home.farm} butchers={home.butchers} />
    </View>
  );
}

function NothingYet() {
  return (
    <View style={css('w-hero')}>
      <Heading level={1} look="display">
        Every cut has a place.
      </Heading>
      <Text size="lead" tone="quiet" measure>
        No cutting day is open just now. The next one will be shown here as soon as it is planned.
      </Text>
    </View>
  );
}
