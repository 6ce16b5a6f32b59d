/** What a team that hosts the pages has put beside them (defaults.json): read once, checked by the engine. */
import type { Problem, Team } from '../contract.js';
import { engine } from '../engine/client.js';
import { siteFile } from '../shipped.js';

export interface TeamChoices {
  readonly team: Team;
  /** What is wrong with the file; it concerns whoever hosts the pages. */
  readonly problems: readonly Problem[];
}

export const noTeam: TeamChoices = {
  team: { materials: [], units: 'si', linkAddress: '', limits: { tolerance: 0, lowest: 0, lines: [] } },
  problems: [],
};

export async function readTeam(): Promise<TeamChoices> {
  const address = siteFile('defaults.json');
  if (!address) {
    return noTeam;
  }
  try {
    const response = await fetch(address);
    if (!response.ok) {
      return noTeam;
    }
    const answer = await engine.call('team', { text: await response.text() }, { quick: true });
    return answer.kind === 'result' ? answer.result : noTeam;
  } catch {
    // Without a network and never seen before: the pages work without it.
    return noTeam;
  }
}
