import type { CandidateJson, ReleaseJson } from '@shared/schemas/release';
import type { Candidate } from '../models/Candidate';
import type { Release } from '../models/Release';
import { isSealIntact } from '../services/signRelease';
import { byLine } from './byLine';

export function presentCandidate(candidate: Candidate): CandidateJson {
  const { id, letter, settings, note, createdAt } = candidate;
  return {
    id,
    letter,
    settings,
    note,
    by: byLine(candidate.by),
    createdAt: createdAt.toISOString(),
  };
}

export function presentRelease(release: Release): ReleaseJson {
  const { id, studyId, revision, content, seal } = release;
  return {
    id,
    studyId,
    revision,
    content,
    contentHash: release.contentHash,
    sealShort: seal.slice(0, 12),
    isSealIntact: isSealIntact(release),
  };
}
