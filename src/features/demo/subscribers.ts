import type { Unit } from '@/engine';

/** Somebody on the demo's list. Days are counted back from the day the demo is filled. */
export interface DemoSubscriber {
  readonly name?: string;
  readonly email: string;
  readonly units: Unit;
  /** Absent: asked, and has not pressed the button in the letter yet. */
  readonly confirmedDaysAgo?: number;
  readonly leftDaysAgo?: number;
  /** What their mail server does with the demo's mailing; usual: takes it. */
  readonly server?: 'refuses' | 'later';
}

export const DEMO_SUBSCRIBERS: readonly DemoSubscriber[] = [
  { name: 'Wenna Tolliver', email: 'wenna@quilletlane.example', units: 'in', confirmedDaysAgo: 57 },
  { name: 'Odile Marchbank', email: 'odile.marchbank@post.example', units: 'mm', confirmedDaysAgo: 55 },
  { name: 'Tobiah Fenn', email: 'tobiah@fennhouse.example', units: 'in', confirmedDaysAgo: 54 },
  { email: 'allotment14@marrowend.example', units: 'cm', confirmedDaysAgo: 51 },
  { name: 'Perpetua Oake', email: 'p.oake@mail.example', units: 'in', confirmedDaysAgo: 49 },
  { name: 'Lorens Vik', email: 'lorens@vik.example', units: 'mm', confirmedDaysAgo: 44, server: 'later' },
  { name: 'Marit Solhaug', email: 'marit.solhaug@post.example', units: 'cm', confirmedDaysAgo: 44 },
  { name: 'Casimir Dell', email: 'casimir@mail.example', units: 'in', confirmedDaysAgo: 41 },
  { name: 'Bettine Hollow', email: 'bettine@hollowfarm.example', units: 'in', confirmedDaysAgo: 38 },
  { email: 'beans.and.more@post.example', units: 'mm', confirmedDaysAgo: 36 },
  { name: 'Gwill Ansty', email: 'gwill.ansty@mail.example', units: 'in', confirmedDaysAgo: 33 },
  { name: 'Ruta Kalnins', email: 'ruta@kalnins.example', units: 'mm', confirmedDaysAgo: 30 },
  { name: 'Emmerich Thal', email: 'emmerich.thal@post.example', units: 'cm', confirmedDaysAgo: 27 },
  { name: 'Sunniva Brae', email: 'sunniva@brae.example', units: 'mm', confirmedDaysAgo: 25 },
  { name: 'Old Pascoe', email: 'pascoe@marrowend.example', units: 'in', confirmedDaysAgo: 22, server: 'refuses' },
  { name: 'Ilse Quendt', email: 'ilse.quendt@mail.example', units: 'mm', confirmedDaysAgo: 20 },
  { email: 'library@marrowend.example', units: 'in', confirmedDaysAgo: 18 },
  { name: 'Joscelin Reed', email: 'joscelin@reedandrush.example', units: 'in', confirmedDaysAgo: 13 },
  { name: 'Tamsyn Orchard', email: 'tamsyn.orchard@post.example', units: 'cm', confirmedDaysAgo: 11 },
  { name: 'Anselm Pike', email: 'anselm@mail.example', units: 'in', confirmedDaysAgo: 7 },
  { name: 'Dorothea Linnet', email: 'dorothea@linnet.example', units: 'in', confirmedDaysAgo: 35, leftDaysAgo: 3 },
  { name: 'Yvo Marsh', email: 'yvo.marsh@mail.example', units: 'mm', confirmedDaysAgo: 2 },
  { name: 'Henrike Sorrel', email: 'henrike@sorrel.example', units: 'cm', confirmedDaysAgo: 1 },
  { email: 'compost.corner@post.example', units: 'in' },
  { name: 'Fitch Underhill', email: 'fitch@mail.example', units: 'mm' },
];
