'use client';

import dynamic from 'next/dynamic';
import { useCallback, useMemo, useState } from 'react';
import useSWR from 'swr';
import { PriceTape } from '@/components/price-tape/price-tape';
import { Button, ButtonLink } from '@/components/ui/button';
import { readJson } from '@/components/ui/json';
import { LengthText } from '@/components/ui/length';
import { Notice } from '@/components/ui/notice';
import { Skeleton } from '@/components/ui/skeleton';
import { CallLine } from '@/components/ui/states';
import type { KitchenView, SchemeView } from '@/lib/contracts/scheme';
import { formatCents } from '@/lib/engine/money';
import type { ChoiceChange, Choices, Massing, OptionState, ZoneOrKitchen } from '@/lib/engine/types';
import { paths } from '@/lib/paths';
import { AllChoices } from './all-choices';
import { AskForChange } from './ask-for-change';
import { massing, takeoff } from './compute';
import { ConflictDialog } from './conflict-dialog';
import { DecisionHead } from './decision-head';
import {
  changeWords,
  decisionsOf,
  ownAnswers,
  scopesOf,
  swapWords,
  type Decision,
  type DecisionKey,
  type Part,
} from './decisions';
import { elevations } from './elevation';
import { FitNotes } from './fit-notes';
import { InsideBand, insidePlaces } from './inside-band';
import { kitchenWords } from './kitchen-words';
import { OptionBand, UnsureBlock } from './option-band';
import { OptionPicture } from './option-picture';
import { HatchDefinition } from './pictures/paper';
import { RoomPanel } from './room-panel';
import { SchemeMenu } from './scheme-menu';
import { changesBetween, type DecisionMark } from './scheme-edit';
import { kept, shown } from './scheme-sync';
import { useOptions } from './use-options';
import { editId, storedOf, useScheme } from './use-scheme';
import { WallNavigation } from './wall-navigation';

// Three comes after the page can be used; until then its place is a calm field.
const RoomView = dynamic(() => import('@/components/scene/room-view'), {
  ssr: false,
  loading: () => <Skeleton className="size-full" />,
});

/** The place of the front with a mark; the whole kitchen when it has none. */
const zoneOf = (room: Massing, mark: string): ZoneOrKitchen =>
  room.fronts.find((front) => front.mark === mark)?.zone ?? 'kitchen';

const firstName = (name: string): string => name.split(' ')[0] ?? name;

/** The screen on which a kitchen is chosen: one scheme at a time, kept by letter. */
export function ChoosingScreen({ kitchen, initial }: { kitchen: KitchenView; initial: string | null }) {
  const [schemes, setSchemes] = useState(kitchen.schemes);
  const [currentId, setCurrentId] = useState(() => pick(kitchen.schemes, initial)?.id ?? null);
  const current = schemes.find((one) => one.id === currentId);

  const keep = useCallback(
    (scheme: SchemeView) => setSchemes((known) => known.map((one) => (one.id === scheme.id ? scheme : one))),
    [],
  );
  const add = useCallback((scheme: SchemeView) => {
    setSchemes((known) => [...known, scheme]);
    setCurrentId(scheme.id);
    showLetter(scheme.letter);
  }, []);

  if (!current) return null;
  return (
    <OneScheme
      key={current.id}
      kitchen={kitchen}
      scheme={current}
      schemes={schemes}
      onStored={keep}
      onAdded={add}
      onPick={(id) => {
        setCurrentId(id);
        const letter = schemes.find((one) => one.id === id)?.letter;
        if (letter) showLetter(letter);
      }}
    />
  );
}

/** The scheme of the address, else the newest one of the household's, else the proposal. */
function pick(schemes: readonly SchemeView[], letter: string | null): SchemeView | undefined {
  const own = [...schemes]
    .filter((one) => !one.proposed)
    .sort((a, b) => b.updatedAt.localeCompare(a.updatedAt));
  return schemes.find((one) => one.letter === letter) ?? own[0] ?? schemes[0];
}

/** Keeps the letter in the address, so that a reload or a shared link opens the same scheme. */
function showLetter(letter: string): void {
  const url = new URL(window.location.href);
  url.searchParams.set('scheme', letter);
  window.history.replaceState(null, '', url);
}

function OneScheme({
  kitchen,
  scheme,
  schemes,
  onStored,
  onAdded,
  onPick,
}: {
  kitchen: KitchenView;
  scheme: SchemeView;
  schemes: readonly SchemeView[];
  onStored: (scheme: SchemeView) => void;
  onAdded: (scheme: SchemeView) => void;
  onPick: (schemeId: string) => void;
}) {
  const { company, job, survey, edition, terms } = kitchen;
  const slug = company.slug;
  const salesperson = firstName(kitchen.salesperson.name);

  const totalOf = useCallback(
    (choices: Choices) => takeoff(survey, edition, choices, terms).total,
    [survey, edition, terms],
  );
  const { sync, tell, edit } = useScheme({ company: slug, jobId: job.id, scheme, totalOf, onStored });

  // Another person's change of the same scheme arrives when the page is looked at again.
  useSWR<readonly SchemeView[]>(paths.api.schemes(slug, job.id), readJson, {
    refreshInterval: 15_000,
    onSuccess: (found) => {
      const fresh = found.find((one) => one.id === scheme.id);
      if (fresh) tell({ kind: 'refreshed', stored: storedOf(fresh) });
    },
  });

  const draft = useMemo(() => shown(sync), [sync]);
  const { choices } = draft;
  const taken = useMemo(() => takeoff(survey, edition, choices, terms), [survey, edition, choices, terms]);
  const room = useMemo(() => massing(survey, edition, choices), [survey, edition, choices]);
  const walls = useMemo(() => elevations(room), [room]);
  const words = useMemo(
    () => kitchenWords({ survey, edition, choices, takeoff: taken }),
    [survey, edition, choices, taken],
  );

  const decisions = useMemo(() => decisionsOf(edition), [edition]);
  const [at, setAt] = useState<DecisionKey>('style');
  const [wantedScope, setScope] = useState<ZoneOrKitchen>('kitchen');
  const [wall, setWall] = useState(survey.walls[0]?.id ?? '');
  const [opening, setOpening] = useState<string | null>(() => insidePlaces(survey, edition)[0]?.mark ?? null);
  const [listing, setListing] = useState(false);
  const [askedAbout, setAskedAbout] = useState<OptionState | null>(null);

  const decision = decisions.find((one) => one.key === at) ?? decisions[0];
  const scopes = useMemo(() => scopesOf(edition, survey, at), [edition, survey, at]);
  const scope = scopes.includes(wantedScope) ? wantedScope : 'kitchen';
  const options = useOptions({ survey, edition, choices, terms, totalNow: taken.total, at, scope, opening });

  if (!decision) return null;

  function open(key: DecisionKey) {
    setAt(key);
    setAskedAbout(null);
    setListing(false);
  }

  function step(by: -1 | 1) {
    const index = decisions.findIndex((one) => one.key === at);
    const next = decisions[(index + by + decisions.length) % decisions.length];
    if (next) open(next.key);
  }

  function act(label: string, changes: readonly ChoiceChange[], marks?: readonly DecisionMark[]) {
    const keys = new Set(changes.map((change) => ('inside' in change ? 'inside' : change.key)));
    setAskedAbout(null);
    edit({ label, changes, marks: marks ?? [...keys].map((key) => ({ key, as: 'decided' as const })) });
  }

  function choose(option: OptionState) {
    const change: ChoiceChange =
      at === 'inside'
        ? { inside: opening ?? '', option: option.id === 'none' ? null : option.id }
        : { key: at, zone: scope, option: option.id };
    const marks: DecisionMark[] = [{ key: at, as: 'decided' }];
    if (option.chosen) {
      // Taking what is proposed decides it.
      if (!draft.decided.includes(at)) act(`Keep ${option.name}`, [], marks);
      return;
    }
    act(changeWords(edition, change), [change, ...option.swaps], marks);
  }

  function pickPart(part: Part, zone: ZoneOrKitchen, mark: string | null) {
    const ofPart = decisions.filter((one) => one.part === part);
    // Staying with the doors keeps the decision at hand: only the place changes.
    const next = ofPart.find((one) => one.key === at) ?? ofPart[0];
    if (!next) return;
    if (at === 'inside' && mark) {
      // A pair's two leaves hang before one opening.
      setOpening(mark.replace(/[LR]$/, ''));
      return;
    }
    const split = next.key !== 'inside' && ownAnswers(choices, next.key).length > 0;
    setScope(split || wantedScope !== 'kitchen' ? zone : 'kitchen');
    open(next.key);
  }

  const waiting = kept(sync).length;
  const baseline = kitchen.sealed ? 'signed' : 'firstEstimate';
  const baselineCents = kitchen.baselineCents ?? scheme.totalCents;
  const blocked = taken.notes.find((note) => note.severity === 'cannotBeBuilt');
  const unsure = draft.unsure.includes(at);
  const decidedCount = decisions.filter((one) => draft.decided.includes(one.key)).length;

  return (
    <div
      data-wide
      className="grid h-full grid-cols-[minmax(0,1fr)] grid-rows-[minmax(min-content,1fr)_auto_auto_auto] gap-frame"
    >
      <HatchDefinition />
      <RoomPanel
        walls={walls}
        edition={edition}
        wall={wall}
        words={words}
        room={(station, otherwise) => (
          <RoomView
            massing={room}
            edition={edition}
            station={station}
            label={words.join(' ')}
            onPick={(mark) => pickPart('doors', zoneOf(room, mark), mark)}
            fallback={otherwise}
          />
        )}
        onWall={setWall}
        onPart={pickPart}
        tools={
          <>
            <SchemeMenu
              company={slug}
              jobId={job.id}
              schemes={schemes}
              current={scheme.id}
              currentCents={taken.total}
              waiting={waiting > 0}
              onPick={onPick}
              onAdded={onAdded}
            />
            <button
              type="button"
              aria-haspopup="dialog"
              onClick={() => setListing(true)}
              className="min-h-target rounded-frame px-2 text-label whitespace-nowrap underline underline-offset-4 hover:bg-plaster"
            >
              {decidedCount} of {decisions.length} decided
            </button>
            <span className="ml-auto flex items-center">
              <SaveState waiting={waiting} offline={sync.offline} />
              <HistoryButton
                kind="undo"
                off={sync.past.length === 0}
                onPress={() => tell({ kind: 'undo', id: editId() })}
              />
              <HistoryButton
                kind="redo"
                off={sync.future.length === 0}
                onPress={() => tell({ kind: 'redo', id: editId() })}
              />
            </span>
          </>
        }
        foot={
          <>
            <SchemeTroubles
              sync={sync}
              contact={{ name: company.name, phone: company.phone }}
              onAgain={() => tell({ kind: 'online' })}
              onNoticed={() => tell({ kind: 'noticed' })}
              onDrop={() => tell({ kind: 'drop' })}
            />
            <FitNotes notes={taken.notes} onWayOut={(label, changes) => act(label, changes)} />
          </>
        }
      />
      <section
        aria-label="What is being chosen"
        className="flex min-w-0 flex-wrap items-center gap-x-3 gap-y-1 rounded-frame border border-hairline bg-panel px-2 py-1 md:gap-x-5 md:px-4 lg:flex-nowrap"
      >
        <WallNavigation
          walls={walls}
          edition={edition}
          wall={wall}
          part={decision.part}
          scope={scope}
          opening={at === 'inside' ? opening : null}
          onWall={setWall}
          onPart={pickPart}
        />
        <DecisionHead
          decision={decision}
          scope={scope}
          scopes={scopes}
          status={
            draft.decided.includes(at)
              ? 'Decided. You can change it until you sign.'
              : unsure
                ? `${salesperson} will talk it over with you.`
                : `${salesperson} proposes this. Keep it or choose another.`
          }
          onScope={setScope}
          onStep={step}
        />
      </section>
      <section
        aria-label={`Options: ${decision.title}`}
        className="min-w-0 rounded-frame border border-hairline bg-panel"
      >
        {at === 'inside' && (
          <InsideBand
            survey={survey}
            edition={edition}
            choices={choices}
            opening={opening}
            onOpening={setOpening}
          />
        )}
        <OptionBand
          key={`${at} ${scope} ${opening ?? ''}`}
          label={decision.title}
          options={options}
          confirmed={draft.decided.includes(at)}
          proposedBy={salesperson}
          picture={(option) => (
            <OptionPicture at={at} option={option.id} edition={edition} choices={choices} scope={scope} />
          )}
          swapWords={(option) => swapWords(edition, option.swaps)}
          onChoose={choose}
          onAsk={setAskedAbout}
          after={
            <UnsureBlock
              unsure={unsure}
              salesperson={salesperson}
              onPress={() =>
                act(
                  unsure ? 'No longer left open' : `Left to ${salesperson}`,
                  [],
                  [{ key: at, as: unsure ? 'open' : 'unsure' }],
                )
              }
            />
          }
        />
        {askedAbout && (
          <WhyNot
            option={askedAbout}
            onNearest={(change) => act(changeWords(edition, change), [change])}
            nearest={askedAbout.nearest ? changeWords(edition, askedAbout.nearest) : null}
          />
        )}
      </section>
      <PriceTape
        priced={taken}
        baselineCents={baselineCents}
        baseline={baseline}
        taxPlace={terms.tax.mode === 'none' ? undefined : terms.tax.place}
        action={
          kitchen.sealed ? (
            <AskForChange
              company={slug}
              jobId={job.id}
              schemeId={scheme.id}
              agreed={kitchen.sealed.choices}
              choices={choices}
              edition={edition}
              differenceCents={taken.total - baselineCents}
              reason={
                waiting > 0
                  ? 'Your last change is still being sent.'
                  : blocked
                    ? 'A fit note must be cleared first.'
                    : null
              }
            />
          ) : (
            <ReviewLink
              href={`${paths.review(slug, job.id)}?scheme=${scheme.id}`}
              busy={waiting > 0}
              reason={
                sync.mismatch
                  ? 'The two totals must agree first.'
                  : blocked
                    ? 'A fit note must be cleared first.'
                    : sync.offline || sync.trouble
                      ? 'As soon as your choices are sent.'
                      : null
              }
            />
          )
        }
      />
      {sync.conflict && (
        <ConflictDialog
          edition={edition}
          mine={{ changes: kept(sync).flatMap((one) => one.changes), cents: taken.total }}
          theirs={{
            changes: changesBetween(sync.stored.choices, sync.conflict.theirs.choices),
            cents: sync.conflict.theirs.totalCents,
          }}
          onMine={() => tell({ kind: 'keepMine' })}
          onTheirs={() => tell({ kind: 'takeTheirs' })}
        />
      )}
      <AllChoices
        open={listing}
        onOpenChange={setListing}
        words={words}
        edition={edition}
        decisions={decisions}
        draft={draft}
        salesperson={salesperson}
        onPick={(one: Decision) => open(one.key)}
      />
    </div>
  );
}

/** On to the agreement, once everything that is shown is also kept. */
function ReviewLink({ href, busy, reason }: { href: string; busy: boolean; reason: string | null }) {
  const words = 'Review and sign';
  if (reason === null && !busy) return <ButtonLink href={href}>{words}</ButtonLink>;
  return (
    <Button disabled={busy} reason={reason}>
      {words}
    </Button>
  );
}

/** Where the work stands with the server, in two words. */
function SaveState({ waiting, offline }: { waiting: number; offline: boolean }) {
  return (
    <span role="status" className="hidden px-3 text-note text-quiet sm:inline">
      {offline ? 'Kept on this device' : waiting > 0 ? 'Saving' : 'Saved'}
    </span>
  );
}

function HistoryButton({ kind, off, onPress }: { kind: 'undo' | 'redo'; off: boolean; onPress: () => void }) {
  return (
    <button
      type="button"
      aria-label={kind === 'undo' ? 'Undo' : 'Redo'}
      aria-disabled={off || undefined}
      onClick={() => !off && onPress()}
      className="grid size-11 place-items-center rounded-frame hover:bg-plaster aria-disabled:text-hairline"
    >
      <svg
        viewBox="0 0 24 24"
        className={kind === 'undo' ? 'size-6' : 'size-6 -scale-x-100'}
        aria-hidden="true"
        fill="none"
        stroke="currentColor"
        strokeWidth="1.8"
      >
        <path d="M9 5 L4 10 L9 15 M4.5 10 H14.5 C22 10 22 20 14.5 20 H11" />
      </svg>
    </button>
  );
}

/** Everything that stands between the screen and the server, each with what to do about it. */
function SchemeTroubles({
  sync,
  contact,
  onAgain,
  onNoticed,
  onDrop,
}: {
  sync: ReturnType<typeof useScheme>['sync'];
  contact: { readonly name: string; readonly phone: string };
  onAgain: () => void;
  onNoticed: () => void;
  onDrop: () => void;
}) {
  if (sync.mismatch) {
    return (
      <Notice kind="error" title="Two totals that should be one" className="m-2">
        <p>
          This screen comes to {formatCents(sync.mismatch.hereCents)}, our computation to{' '}
          {formatCents(sync.mismatch.thereCents)}. Nothing can be signed until they agree. Load the page
          again; if it stays so, please call.
        </p>
        <CallLine contact={contact} />
        <div className="mt-2 flex flex-wrap gap-3">
          <Button onClick={() => window.location.reload()}>Load again</Button>
          <Button tone="quiet" onClick={onDrop}>
            Leave my last change out
          </Button>
        </div>
      </Notice>
    );
  }
  if (sync.refused) {
    return (
      <Notice
        kind="error"
        className="m-2"
        action={
          <Button tone="quiet" onClick={onNoticed}>
            I have read it
          </Button>
        }
      >
        {sync.refused} What you see is what is kept.
      </Notice>
    );
  }
  if (sync.trouble) {
    return (
      <Notice
        kind="caution"
        className="m-2"
        action={
          <Button tone="quiet" onClick={onAgain}>
            Send again
          </Button>
        }
      >
        {sync.trouble} Your choices are kept on this device.
      </Notice>
    );
  }
  if (sync.offline) {
    return (
      <Notice kind="caution" className="m-2">
        No connection just now. What you choose is kept on this device and sent when it is back.
      </Notice>
    );
  }
  if (sync.merged) {
    return (
      <Notice
        kind="info"
        className="m-2"
        action={
          <Button tone="quiet" onClick={onNoticed}>
            Good
          </Button>
        }
      >
        Something else in this scheme was changed on another screen. Both changes are kept.
      </Notice>
    );
  }
  return null;
}

/** Why an option cannot be had, with the nearest choice that can. */
function WhyNot({
  option,
  nearest,
  onNearest,
}: {
  option: OptionState;
  nearest: string | null;
  onNearest: (change: ChoiceChange) => void;
}) {
  const change = option.nearest;
  return (
    <div
      role="status"
      className="flex flex-wrap items-center gap-3 border-t border-hairline px-3 py-2 md:px-5"
    >
      <p>
        <span className="font-semibold">
          <LengthText text={option.name} />
        </span>
        : <LengthText text={option.reason ?? 'It does not go with these choices.'} />
      </p>
      {change && nearest && (
        <Button tone="quiet" onClick={() => onNearest(change)}>
          Take instead: {nearest}
        </Button>
      )}
    </div>
  );
}
