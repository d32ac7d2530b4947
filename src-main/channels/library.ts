import { caHighTraub2003 } from './ca-high-traub-2003.ts';
import { caLReuveni1993 } from './ca-l-reuveni-1993.ts';
import { caTDestexhe1996 } from './ca-t-destexhe-1996.ts';
import { caTHuguenardMccormick1992 } from './ca-t-huguenard-mccormick-1992.ts';
import { hHuguenardMccormick1992 } from './h-huguenard-mccormick-1992.ts';
import { hKole2006 } from './h-kole-2006.ts';
import { hMagee1998 } from './h-magee-1998.ts';
import { kAConnorStevens1971 } from './k-a-connor-stevens-1971.ts';
import { kADistalHoffman1997 } from './k-a-distal-hoffman-1997.ts';
import { kAProximalHoffman1997 } from './k-a-proximal-hoffman-1997.ts';
import { kConnorStevens1971 } from './k-connor-stevens-1971.ts';
import { kDGolomb2007 } from './k-d-golomb-2007.ts';
import { kHodgkinHuxley1952 } from './k-hodgkin-huxley-1952.ts';
import { kKv3Golomb2007 } from './k-kv3-golomb-2007.ts';
import { kMTraub2003 } from './k-m-traub-2003.ts';
import { kMYamada1989 } from './k-m-yamada-1989.ts';
import { kTraub2005 } from './k-traub-2005.ts';
import { kTraubMiles1991 } from './k-traub-miles-1991.ts';
import { kWangBuzsaki1996 } from './k-wang-buzsaki-1996.ts';
import { naConnorStevens1971 } from './na-connor-stevens-1971.ts';
import { naGolomb2007 } from './na-golomb-2007.ts';
import { naHodgkinHuxley1952 } from './na-hodgkin-huxley-1952.ts';
import { naPersistentAusborn2018 } from './na-persistent-ausborn-2018.ts';
import { naPersistentMagistrettiAlonso1999 } from './na-persistent-magistretti-alonso-1999.ts';
import { naTraub2005 } from './na-traub-2005.ts';
import { naTraubMiles1991 } from './na-traub-miles-1991.ts';
import { naWangBuzsaki1996 } from './na-wang-buzsaki-1996.ts';
import type { StoredChannel } from './kinetics.ts';

/** The published channels a cell can name without describing them, by id; grouped by what carries the current. */
export const storedChannels: ReadonlyMap<string, StoredChannel> = new Map(
  [
    naHodgkinHuxley1952,
    naConnorStevens1971,
    naWangBuzsaki1996,
    naTraubMiles1991,
    naTraub2005,
    naGolomb2007,
    naPersistentAusborn2018,
    naPersistentMagistrettiAlonso1999,
    kHodgkinHuxley1952,
    kConnorStevens1971,
    kAConnorStevens1971,
    kWangBuzsaki1996,
    kTraubMiles1991,
    kMYamada1989,
    kAProximalHoffman1997,
    kADistalHoffman1997,
    kTraub2005,
    kMTraub2003,
    kKv3Golomb2007,
    kDGolomb2007,
    caLReuveni1993,
    caTDestexhe1996,
    caTHuguenardMccormick1992,
    caHighTraub2003,
    hHuguenardMccormick1992,
    hMagee1998,
    hKole2006,
  ].map((channel) => [channel.name, channel]),
);
