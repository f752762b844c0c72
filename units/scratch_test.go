package units
import ("testing";"strings";"fmt")
func TestScratch(t *testing.T){
 s:=Standard()
 seen:=map[Dimension]string{}
 for line := range strings.Lines(habitRows) {
  w:=strings.Fields(line); if len(w)<2 {continue}
  for _,x:=range w[1:] { x=strings.TrimPrefix(x,"~"); x,_,_=strings.Cut(x,":")
   u,err:=s.Parse(x); if err!=nil {t.Error(err);continue}
   if o,ok:=seen[u.dim]; ok && o!=w[0] {fmt.Println("dup",o,w[0])}
   seen[u.dim]=w[0] }
 }
 for _,x:=range []string{"mJ/cm2","W/m*K","W/m K","W/m2.K","mJ per cm2","/m*K","1/m*K","a.b","m.s","W / m","m()","()","(m","m)","m\u200b2","cm\u2212 1","s−1","deg^(1/97)","Qm^21","nm^(1/2)","(m*s)^(1/6)","kmin","mkg","ppt","KHz","mj","Nm","hz","ev","м","m**2","m+2","m2.5","{x}","12h","℃","ºC","º","A\u030A/s","m·","//m","m//s","m-","x","g.m.s","\x00","m\x00","W/m2/K*s","m°C","_","1","1/1","PA", "(m K","m^","m^(1/2","m^0","m^22", "m^127"}{
  u,err:=s.Parse(x); fmt.Printf("%q → %v | %v\n",x,u,err)
 }
 c,_:=s.Parse("°C")
 for _,v:=range []float64{273.15,300,295.15,0,1e-10,298.15,310.4,1e20} {fmt.Println(v,c.Digits(v),s.TextIn(v,c,5),s.TextIn(v,c,17))}
 q,_:=s.Parse("qm"); fmt.Println(s.TextIn(1e300,q,5),q.Digits(1e300))
 q,_=s.Parse("Qm"); fmt.Println(s.TextIn(1e-300,q,5),q.Digits(1e-300))
 h,_:=s.Parse("nm^(1/2)");fmt.Println(h.scale.float(),h.Digits(1),h.From(1))
}
