import type { Vec3 } from '../domain/vector.ts';
import type { Camera } from '../drawing/camera.ts';

/** Topics of the BIM Collaboration Format (buildingSMART), apart from how a version of it writes them. */

export type BcfVersion = '2.1' | '3.0';

export interface TopicComment {
  readonly guid: string;
  /** xs:dateTime */
  readonly date: string;
  readonly author: string;
  readonly text: string;
}

/** What a viewer is to show: a camera, elements in colour, and what stands before them cut off. */
export interface TopicView {
  readonly guid: string;
  readonly camera: Camera;
  /** GlobalIds by colour (rrggbb); empty where nothing is selected. */
  readonly coloured: readonly { readonly colour: string; readonly globalIds: readonly string[] }[];
  /** A plane, and the side of it that is hidden; null where nothing is cut. */
  readonly clipping: { readonly at: Vec3; readonly hidden: Vec3 } | null;
  /** PNG */
  readonly snapshot: Uint8Array;
}

/** What a topic says, whichever way it goes. */
interface TopicText {
  readonly guid: string;
  readonly title: string;
  readonly type: string;
  readonly status: string;
  readonly priority: string;
  readonly labels: readonly string[];
  readonly created: string;
  readonly author: string;
  readonly assignedTo: string | null;
  readonly description: string;
  readonly comments: readonly TopicComment[];
}

export interface Topic extends TopicText {
  readonly modified: string | null;
  readonly views: readonly TopicView[];
}

/** The model that the topics are about. */
export interface TopicModel {
  readonly fileName: string;
  readonly date: string;
  /** GlobalId of the IfcProject; null where there is none that could be written. */
  readonly project: string | null;
  readonly projectName: string | null;
}

/** A topic as it came back. */
export interface ReturnedTopic extends TopicText {
  /** GlobalIds of the elements that its viewpoints select or colour. */
  readonly components: readonly string[];
  /** GlobalIds of the projects that its header names. */
  readonly projects: readonly string[];
}

export interface ReturnedBcf {
  /** As its `bcf.version` says; null where it does not. */
  readonly version: string | null;
  readonly topics: readonly ReturnedTopic[];
  /** Topics that could not be read. */
  readonly unreadable: number;
}
