/** The usual cautions, in whole. Screens with figures show the part that concerns them. */
export const Cautions = () => (
  <div className="flex flex-col gap-2">
    <p>
      <b>Ovenbird plans; it does not run, watch or certify anything.</b> No booth, lamp or breathing mask is controlled
      by it. The maker’s data sheets, local fire, electrical, environmental and health rules, and the licensed people in
      charge come first, whatever a plan says.
    </p>
    <ul className="flex list-disc flex-col gap-1 pl-5">
      <li>
        Sprayed isocyanates can cause asthma for life. Breathe supplied air while spraying and until the booth’s
        measured clearance time is over; everybody else stays out.
      </li>
      <li>Nobody enters during purge or bake.</li>
      <li>
        Lamps and their leads leave the booth before anybody sprays. Purge comes before heat. Without the fan there is
        no heat.
      </li>
      <li>
        Vehicles with high-voltage batteries and plastic parts bear less heat than steel: their own limits count, also
        over several bakes.
      </li>
      <li>
        Times for flash, cure and windows are least times at the air they were entered for. Look at the film before you
        go on. Figures marked as common practice come from no data sheet.
      </li>
    </ul>
  </div>
);
