"""Background and anomaly check values (numpy, scipy); run: python3 make-background.py"""
import math, numpy as np
from scipy import stats
from reference_rows import Ref
# ---- background: robust log MAD + clipping ------------------------------
B = Ref("background")
def robust(y):
    m=np.median(y); return m,1.4826*np.median(np.abs(y-m))
def clip(y,k=3.0,maxit=20):
    keep=np.ones(len(y),bool)
    for it in range(1,maxit+1):
        m,s=robust(y[keep]); new=np.abs(y-m)<=k*s
        if (new==keep).all(): break
        keep=new
    return m,s,keep,it
Ir=np.array([0.021,0.034,0.028,0.019,0.041,0.025,0.030,0.022,0.055,3.90,2.40,1.45,0.92,0.31,0.060,0.027,0.033,0.024,0.029,0.036])
y=np.log10(Ir); m0,s0=robust(y); m,s,keep,it=clip(y)
from shortest_half_clipping import bgclip, shorth_start
sm,ss=shorth_start(y); bc=bgclip(Ir)
B.add("shorth start (log10)",{"C_ng_g":Ir.tolist()},{"m0":sm,"s0":ss},"abs 1e-9","derived; Rousseeuw & Leroy 1988 shortest half")
B.add("background by shorth start then median/MAD clip k=3",{"C_ng_g":Ir.tolist(),"k":3},{"median_log10":bc["m"],"s_log10":bc["s"],"kept0":[int(i) for i in np.where(bc["keep"])[0]],"passes":bc["passes"]},"abs 1e-9","derived")
B.add("log10 median/MAD before clipping",{"C_ng_g":Ir.tolist()},{"median_log10":m0,"s_log10":s0},"abs 1e-9","derived; Rousseeuw & Croux 1993 constant 1.4826")
B.add("log10 median/MAD after two-sided clipping k=3 (plain start)",{"C_ng_g":Ir.tolist(),"k":3},{"median_log10":m,"s_log10":s,"n_kept":int(keep.sum()),"passes":it,"background_ng_g":10**m,"upper_3s_ng_g":10**(m+3*s)},"abs 1e-9","derived")
yb=y[keep]; n=len(yb); sc=s*n/(n-.8); df=max(2.0,.37*(n-1)); t=(y-m)/(sc*math.sqrt(1+math.pi/(2*n))); p=stats.t.sf(t,df)
B.add("predictive t and one-sided p for the 20 samples",{"C_ng_g":Ir.tolist(),"df":round(df,10),"s_c":float(f"{sc:.10g}")},{"t":t,"p":p},"abs 1e-6 on t; rel 1e-4 on p","derived: s_c = s n/(n-0.8), variance s_c^2 (1 + pi/(2n)), max(2, 0.37 (n-1)) degrees of freedom")
def bh(p,q=0.05):
    o=np.argsort(p); n=len(p); c=p[o]<=q*np.arange(1,n+1)/n; k=np.max(np.where(c)[0])+1 if c.any() else 0
    return sorted(int(i) for i in o[:k])
def holm(p,a=0.05):
    o=np.argsort(p); out=[]
    for j,i in enumerate(o):
        if p[i]<=a/(len(p)-j): out.append(int(i))
        else: break
    return sorted(out)
B.add("BH q=0.05 flagged (0-based)",{"p":"as above"},bh(p),"exact","Benjamini & Hochberg 1995")
B.add("Holm alpha=0.05 flagged (0-based)",{"p":"as above"},holm(p),"exact","Holm 1979")
B.add("Sidak per-sample one-sided z for family 0.05",{"N":[20,50,100,200,500]},[stats.norm.isf(1-(0.95)**(1/N)) for N in (20,50,100,200,500)],"abs 1e-6","derived")
B.add("chance of >=1 false 3-sigma one-sided flag",{"N":[20,50,100,200,500]},[1-stats.norm.cdf(3)**N for N in (20,50,100,200,500)],"abs 1e-8","derived")
EF=Ir/10**m
B.add("enrichment factor of sample 9 and its 1-sigma (log10) with 6% analytical error",{"C":3.90,"bg_log10":m,"s_bg_log10":s,"n_bg":n,"rel_err":0.06},{"EF":EF[9],"sigma_log10":math.sqrt((0.06/math.log(10))**2+1.2533**2*s*s/n)},"rel 1e-9","derived (median standard error 1.2533 s/sqrt n)")
E=3.90-10**m; sE=math.sqrt((0.06*3.90)**2+(10**m*math.log(10)*s*1.2533/math.sqrt(n))**2)
B.add("excess and sigma of sample 9",{"C":3.90,"rel_err":0.06},{"excess_ng_g":E,"sigma_ng_g":sE,"z":E/sE},"rel 1e-9","derived")

# ---- censored data: product limit and maximum likelihood
vals=[("<",0.05),("<",0.05),("<",0.05),("",0.06),("",0.08),("",0.09),("<",0.10),("<",0.10),("",0.11),("",0.14),("",0.17),("",0.20),("",0.26),("",0.35)]
VALUES=[q+str(v) for q,v in vals]
def km(vals):
    x=sorted({v for q,v in vals if q==""},reverse=True); S=1.0; out=[]; 
    for v in x:
        nrisk=sum(1 for q,w in vals if (w<=v)); d=sum(1 for q,w in vals if q=="" and w==v)
        F_at=S; S*= (1-d/nrisk); out.append((v,nrisk,d,F_at,S))
    return out   # (value, at risk, detects, P(X<=v), P(X<v))
k=km(vals)
def km_q(k,p):
    if p<=k[-1][4]+1e-12: return None   # inside the leftover mass below the smallest detect: not estimable
    v=[a for a in reversed(k)]
    for (x,n,d,Fa,Fb) in v:
        if Fa>=p-1e-12: return x
# mean with the lowest mass placed at the lowest observation (Efron-type convention)
xs=[a[0] for a in k]; mass=[a[3]-a[4] for a in k]; rem=k[-1][4]; lowest=min(w for q,w in vals)
meanE=sum(x*mm for x,mm in zip(xs,mass))+rem*lowest
B.add("KM left-censored: table (value, n at risk, detects, F(v), F(v-))",{"values":VALUES},[list(a) for a in k],"abs 1e-10","Helsel 2012 (flipping); own implementation, checked with R survival")
B.add("KM quantiles and mean",{"values":VALUES},{"q50":km_q(k,.5),"q75":km_q(k,.75),"q25":km_q(k,.25),"mean_lowest_mass_at_min":meanE},"abs 1e-10","Helsel 2012; derived; null = not estimable (p inside the leftover mass)")
# lognormal MLE as third opinion
from scipy.optimize import minimize
def nll(th):
    mu,ls=th; s=math.exp(ls); L=0
    for q,v in vals:
        zz=(math.log(v)-mu)/s
        L+= stats.norm.logcdf(zz) if q=="<" else stats.norm.logpdf(zz)-ls-math.log(v)
    return -L
o=minimize(nll,[-2.3,-.5],method="Nelder-Mead",options=dict(xatol=1e-12,fatol=1e-13,maxiter=8000))
B.add("censored lognormal MLE",{"values":VALUES},{"mu_ln":o.x[0],"sigma_ln":math.exp(o.x[1]),"loglik":-o.fun},"abs 1e-5","Cohen 1959/1991 censored normal likelihood; own optimiser, checked in R")
# truncated-normal conditional mean for a censored slab
def cond_mean(mu,s,dl):
    return math.exp(mu+s*s/2)*stats.norm.cdf((math.log(dl)-mu)/s-s)/stats.norm.cdf((math.log(dl)-mu)/s)
B.add("E[C | C<DL] lognormal",{"mu_ln":-2.5,"sigma_ln":0.7,"DL":0.05},cond_mean(-2.5,0.7,0.05),"rel 1e-9","derived")
B.write()
