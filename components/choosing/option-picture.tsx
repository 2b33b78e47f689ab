import { chosen, find } from '@/lib/engine/choices';
import type { Edition } from '@/lib/engine/edition-types';
import type { Choices, ZoneOrKitchen } from '@/lib/engine/types';
import type { DecisionKey } from './decisions';
import { DoorPicture } from './pictures/door-picture';
import { MaterialBlock } from './pictures/material-block';
import { NonePicture } from './pictures/paper';
import { SectionPicture } from './pictures/section-picture';
import {
  CounterPicture,
  DrawerBoxPicture,
  EndPicture,
  OverlayPicture,
  PullPicture,
  StoragePicture,
} from './pictures/thing-pictures';

/** The colour of a finish on a species, as its chip shows it: never multiplied, always stored. */
export function finishColour(edition: Edition, speciesId: string, finishId: string): string {
  const species = find(edition.species, speciesId);
  const finish = find(edition.finishes, finishId);
  return finish?.colours?.[speciesId] ?? finish?.colour ?? species?.colour ?? '#c9a477';
}

/** The picture of one option, as a block of material or as a drawing, in the choices at hand. */
export function OptionPicture({
  at,
  option,
  edition,
  choices,
  scope,
}: {
  at: DecisionKey;
  option: string;
  edition: Edition;
  choices: Choices;
  scope: ZoneOrKitchen;
}) {
  const speciesId = chosen(choices, 'species', scope);
  const colour = finishColour(edition, speciesId, chosen(choices, 'finish', scope));
  switch (at) {
    case 'species': {
      const species = find(edition.species, option);
      return (
        <MaterialBlock colour={species?.colour ?? colour} grain={species?.grain ?? 'none'} seed={option} />
      );
    }
    case 'finish': {
      const finish = find(edition.finishes, option);
      const opaque = finish?.family === 'paint' || finish?.family === 'thermofoil';
      const grain = opaque ? 'none' : (find(edition.species, speciesId)?.grain ?? 'none');
      return <MaterialBlock colour={finishColour(edition, speciesId, option)} grain={grain} seed={option} />;
    }
    case 'style': {
      const style = find(edition.styles, option);
      return style ? <DoorPicture style={style} colour={colour} /> : <NonePicture />;
    }
    case 'overlay': {
      const overlay = find(edition.overlays, option);
      return overlay ? <OverlayPicture overlay={overlay} colour={colour} /> : <NonePicture />;
    }
    case 'crown':
    case 'base':
    case 'lightRail': {
      const profiles = { crown: edition.crowns, base: edition.bases, lightRail: edition.lightRails }[at];
      const profile = find(profiles, option);
      return profile ? <SectionPicture profile={profile} /> : <NonePicture />;
    }
    case 'pull': {
      const pull = find(edition.pulls, option);
      return pull ? <PullPicture pull={pull} /> : <NonePicture />;
    }
    case 'ends': {
      const end = find(edition.ends, option);
      return end ? <EndPicture end={end} colour={colour} /> : <NonePicture />;
    }
    case 'drawerBox': {
      const box = find(edition.drawerBoxes, option);
      return box ? <DrawerBoxPicture box={box} /> : <NonePicture />;
    }
    case 'counter': {
      const counter = find(edition.counters, option);
      return counter ? <CounterPicture counter={counter} /> : <NonePicture />;
    }
    case 'inside': {
      const storage = find(edition.storage, option);
      return storage ? <StoragePicture storage={storage} /> : <NonePicture />;
    }
  }
}
