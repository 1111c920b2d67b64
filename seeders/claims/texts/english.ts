import type { StoryTexts } from "./texts";

export const ENGLISH: StoryTexts = {
  notes: {
    brake: {
      grabsWhenWarm: [
        "Drives well cold. After {minutes} minutes on the stand the brake grabs and the wheel stops. Free again once it has cooled.",
        "Customer stops on every longer run. On the stand it lets go for {minutes} minutes, then drags and smells hot.",
        "Second vehicle this month with this fault. Good cold, grabs warm after {minutes} minutes.",
      ],
      drags: ["Drags on the left turn and gets hot. Gap is inside the limit."],
      noise: ["Rattles when released, since about a week. Holds well."],
      willNotHold: [
        "Vehicle rolled back on the ramp although the brake was applied. Nobody was hurt. Taken out of use.",
      ],
    },
    motor: {
      weakWhenWarm: [
        "Strong cold, hardly climbs a kerb after {minutes} minutes. Current twice that of the other side.",
      ],
      runsRough: ["Runs rough at low speed and sparks at one brush. Commutator cleaned, no better."],
    },
    controller: {
      cutsOutWhenWarm: ["Cuts out after {minutes} minutes on the stand and comes back once it has cooled."],
      faultShown: ["Shows a fault at switching on. Brake coil and motor measured first: both good."],
    },
    charger: {
      dead: ["No output and no lamp. Fuse and mains are good."],
      chargesTooLittle: [
        "Charges at a tenth of its current and never ends. Batteries are good on another charger.",
      ],
    },
    battery: {
      shortRange: ["Range down to two miles. One block falls away under load, the other holds."],
      willNotCharge: ["Takes no charge on two chargers that charge other vehicles."],
    },
    gearbox: {
      noise: ["Grinds under load. Motor swapped: the noise stayed with the gearbox."],
      wheelNotDriven: ["Motor turns, wheel does not. Shaft turns freely by hand."],
    },
    throttle: {
      jumps: ["Speed jumps near half way. Wiper sweep shows a gap in the track."],
      dead: ["No drive. Supply is there, the wiper gives nothing."],
    },
  },
  answers: {
    oilOrDirt: ["Dry and clean.", "A little dust, no oil."],
    handReleaseLever: ["In the drive position, moves freely.", "No hand release on this one."],
    faultCode: ["Two long, three short.", "Four flashes, then a pause."],
    waterTrace: ["None seen.", "Dry inside the plugs."],
    programVersion: ["3.14", "2.08"],
    lampState: ["Stays red.", "No lamp at all."],
    batteryTypeUsed: ["Two absorbent mat blocks, 36 Ah."],
    chargerUsed: ["The charger it was sold with, 5 A."],
    noiseAndPlay: ["Grinds under load, play about 4 mm at the rim.", "No noise, play not to be felt."],
    oilTrace: ["None.", "A film at the shaft seal."],
    wheelFixing: ["Tight, paint mark unbroken."],
    motorSwapped: ["Yes, a known good motor. The fault stayed."],
    wiperSweep: ["Smooth up to half way, then a jump.", "No signal over the whole sweep."],
    returnToNeutral: ["Returns by itself.", "Returns, a little slowly."],
  },
  otherAnswer: "Checked, see the note.",
  cannotGet: ["Vehicle is back with the customer.", "Cover is riveted on this make."],
  leftOut: "The meter was at the other bench.",
  ruledOut: ["Measured.", "Checked by hand.", "Swapped for a known good one."],
  looseNut: "Nut half a turn loose, key beside its seat.",
  keyOutOfSeat: "Key lay beside its seat when the wheel came off.",
  incident: "The vehicle rolled back about a metre on a ramp. Nobody was hurt.",
  question: [
    "We need the rows ticked below before we can decide. A photo with the reading in it is enough.",
    "Good file so far. Add what is ticked below, and the temperature of the room beside the reading.",
  ],
  park: "Have you seen this fault code on this controller before?",
  parkChain: "Second motor on this vehicle within the year. Is something else killing them?",
  putBack: "I know the customer. A colleague takes this one.",
  withdraw: "Found a chafed lead beside the part. The part is good.",
  contest:
    "Your run was cold. Ours shows the fault only after {minutes} minutes, the log is in the file. Run it warm for as long as we did.",
  reasons: {
    faultOfThePart:
      "The readings and the run show a fault of the part itself. Nothing points to the fitting or to the use.",
    partlyWorn: "The part had a fault, and a good part of its life behind it. The worn share is not covered.",
    sharedCause:
      "The part was at fault, but the fitting had a share in it: the photo of the key seat shows it.",
    outsideTerm: "The term had ended on the day of the failure.",
    fittingFault: "The key lay beside its seat. The wheel worked loose and took the shaft with it.",
    noFaultShown: "The part ran for ten minutes on our bench and showed no fault.",
  },
  letters: {
    upheld: "Thank you for a complete file. We uphold the claim on {part}, serial {serial}.",
    upheldInPart:
      "We uphold the claim on {part}, serial {serial}, in part. The reason stands beside the line.",
    declined:
      "We cannot uphold the claim on {part}, serial {serial}. The reason stands beside the line, with the way to contest it.",
    reversed:
      "You were right to ask again. Run warm for as long as you did, the part shows the fault. We uphold the claim on {part}, serial {serial}.",
  },
  waived: "Photos, log and readings are clear: the part need not come back.",
  looks: { sameUnit: "Serial as claimed.", marksOfWork: "None." },
  findings: {
    faultConfirmed: "The fault shows as claimed.",
    otherFault: "The part itself is good. The key had worked in the shaft, the seat is worn on one side.",
    noFaultFound: "Ran warm for longer than in the claim. No fault came, all readings are inside the limits.",
    notTheUnit: "The serial on the part is not the one that was claimed.",
    damagedOnTheWay: "Parcel wet through, water inside the part. Dried and photographed, not run.",
    notTestable: "The warm rig is away for repair. Ran cold for ten minutes without a fault.",
  },
  returns: {
    department: "Goods-in",
    instructions: {
      brake: "Leave the cable on. Do not open the brake.",
      motor: "Leave the brushes in. Tie the lead to the housing.",
      battery: "Terminals taped, upright. Not by ordinary post where it is swollen or wet.",
      gearbox: "Drain it, and put the key in a bag.",
    },
    carriers: ["Merrin Parcels", "Overdale Carriers"],
    wet: "Wet on arrival, box soft.",
    notSent: "The day is over, and two mails had no answer.",
    missing: "Carrier has searched for ten days. The proof of dispatch is good.",
    damaged: "One corner crushed, part looks whole.",
    otherSerial: "R2523-7KT4P",
  },
  counterReason: "Issued with the wrong share. A new note follows.",
  messages: {
    parcelSent: "Sent with the ordinary carrier, label 0041 7720 5518.",
    parcelMissing: "Nothing has arrived here under this number. We have asked the carrier.",
    parcelInside:
      "Carrier says lost. The proof of dispatch is good, so this will not be held against the workshop.",
    thanks: "Thank you, that is all we need.",
    reuseInside: "This photo was seen before on another claim of the same workshop. Ask before judging.",
    serialInside: "No such serial was ever shipped. One with an 8 for the B was, to this workshop.",
  },
  log: { on: "On", brakeFault: "Fault: brake grabs", fault: "Fault: cuts out", off: "Off" },
  documents: {
    capacity: [
      "CAPACITY TEST",
      "Constant current 1.65 A to 10.5 V",
      "Room at 21 °C, both blocks tested alone",
    ],
  },
};
